import { getPreferences, preferences, putPreferences } from "@/lib/db/preference";
import { route } from "@/lib/auth/route";

export const GET = route({ access: "session", handler: ({ person }) => getPreferences(person) });

export const PUT = route({
  access: "session",
  body: preferences,
  handler: ({ person, body }) => putPreferences(person, body),
});
