import "server-only";
import { APIError } from "better-auth/api";
import { findTeamIdBySlug, readRole } from "@/lib/db/membership";
import { role as knownRole, roleMay } from "@/lib/schemas/role";

/** Requests that carry a role to be given to somebody. */
const GIVES_ROLE = new Set(["/organization/invite-member", "/organization/update-member-role"]);

/** Requests that tell who is in a team. */
const SHOWS_PEOPLE = new Set([
  "/organization/get-full-organization",
  "/organization/list-members",
  "/organization/list-invitations",
  "/organization/get-active-member-role",
]);

/**
 * One role of our list and nothing else: the package also knows roles of its own, and takes several at once.
 * @throws APIError 400
 */
export function requireOneKnownRole(path: string, body: unknown): void {
  if (!GIVES_ROLE.has(path)) return;
  const role = body !== null && typeof body === "object" && "role" in body ? body.role : undefined;
  if (knownRole.safeParse(role).success) return;
  throw new APIError("BAD_REQUEST", {
    code: "ROLE_NOT_FOUND",
    message: "There is no such role. Choose owner, designer, reviewer or manufacturer, and only one.",
  });
}

/**
 * Manufacturers see nobody: two fabricators of one team do not learn of each other.
 * @throws APIError 403, the same as for somebody outside the team
 */
export async function requireTeamRead(
  path: string,
  userId: string,
  query: unknown,
  activeTeamId: string | null,
): Promise<void> {
  if (!SHOWS_PEOPLE.has(path)) return;
  for (const teamId of await teamsAsked(query, activeTeamId)) {
    const role = await readRole(userId, teamId);
    if (role && roleMay(role, "team:read")) continue;
    throw new APIError("FORBIDDEN", {
      code: "USER_IS_NOT_A_MEMBER_OF_THE_ORGANIZATION",
      message: "This team does not exist, or is not yours to see.",
    });
  }
}

/** Every team that the request could mean; which of them the package prefers does not matter then. */
async function teamsAsked(query: unknown, activeTeamId: string | null): Promise<string[]> {
  const asked = (query ?? {}) as { organizationId?: unknown; organizationSlug?: unknown };
  const ids: string[] = [];
  if (typeof asked.organizationId === "string" && asked.organizationId) ids.push(asked.organizationId);
  if (typeof asked.organizationSlug === "string" && asked.organizationSlug)
    ids.push((await findTeamIdBySlug(asked.organizationSlug)) ?? "");
  if (ids.length === 0 && activeTeamId) ids.push(activeTeamId);
  return ids;
}
