import "server-only";
import { eq } from "drizzle-orm";
import { z } from "zod";
import { getDb } from "./client";
import { userPreference } from "./schema";

export const preferences = z.object({
  lengthUnit: z.enum(["mm", "mil"]),
  theme: z.enum(["system", "light", "dark"]),
});
export type Preferences = z.infer<typeof preferences>;

/** Preferences are a person's own, in whatever team: these take the person instead of an actor. */
interface Person {
  userId: string;
}

export async function getPreferences({ userId }: Person): Promise<Preferences> {
  const db = await getDb();
  const [row] = await db.select().from(userPreference).where(eq(userPreference.userId, userId));
  return { lengthUnit: row?.lengthUnit ?? "mm", theme: row?.theme ?? "system" };
}

export async function putPreferences({ userId }: Person, input: Preferences): Promise<Preferences> {
  const values = preferences.parse(input);
  const db = await getDb();
  await db
    .insert(userPreference)
    .values({ userId, ...values })
    .onConflictDoUpdate({ target: userPreference.userId, set: values });
  return values;
}
