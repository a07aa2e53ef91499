import { readFileSync } from "node:fs";
import path from "node:path";

export type Role = "owner" | "designer" | "reviewer" | "manufacturer";

export interface DemoAccount {
  name: string;
  email: string;
  role: Role;
  password: string;
}

/** One person of the demo team, as set-up wrote them beside the database that these tests drive. */
export function readAccount(role: Role): DemoAccount {
  const file = path.resolve(".cache/browser-tests/demo-accounts.json");
  const accounts = JSON.parse(readFileSync(file, "utf8")) as DemoAccount[];
  const account = accounts.find((entry) => entry.role === role);
  if (!account) throw new Error(`The demo has no ${role}.`);
  return account;
}
