import { readFileSync } from "node:fs";
import path from "node:path";
import { eq } from "drizzle-orm";
import { getAuth } from "@/lib/auth/auth";
import { getDb } from "@/lib/db/client";
import { newId } from "@/lib/db/ids";
import { member, user } from "@/lib/db/schema";
import type { UserActor } from "@/lib/schemas/actor";
import type { Role } from "@/lib/schemas/role";

export interface DemoAccount {
  name: string;
  email: string;
  role: Role;
  password: string;
}

/** The people whose passwords set-up made; the demo has nobody else. */
export function readAccounts(): DemoAccount[] {
  const file = path.join(process.env.DATA_DIR ?? "data", "demo-accounts.json");
  return JSON.parse(readFileSync(file, "utf8")) as DemoAccount[];
}

/** Signs everybody up through the app's own accounts and puts them into the team that the owner makes. */
export async function makeTeam(accounts: DemoAccount[]): Promise<Record<Role, UserActor>> {
  const auth = await getAuth();
  const db = await getDb();
  const people = new Map<Role, { account: DemoAccount; userId: string }>();
  for (const account of accounts) {
    const { email, password, name } = account;
    const made = await auth.api.signUpEmail({ body: { email, password, name } });
    // Their addresses are invented: no link could reach them.
    await db.update(user).set({ emailVerified: true }).where(eq(user.id, made.user.id));
    people.set(account.role, { account, userId: made.user.id });
  }
  const owner = people.get("owner");
  if (!owner) throw new Error("The demo needs an owner.");
  const team = await auth.api.createOrganization({
    body: { name: "Saltmarsh Sensing", slug: "saltmarsh-sensing", userId: owner.userId },
  });
  if (!team) throw new Error("The demo team could not be made.");
  const actors = {} as Record<Role, UserActor>;
  for (const [role, { account, userId }] of people) {
    if (role !== "owner")
      await db
        .insert(member)
        .values({ id: newId(), organizationId: team.id, userId, role, createdAt: new Date() });
    actors[role] = { kind: "user", userId, teamId: team.id, role, email: account.email, name: account.name };
  }
  return actors;
}
