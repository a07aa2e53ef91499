import "server-only";
import { createAccessControl } from "better-auth/plugins/access";
import { defaultStatements } from "better-auth/plugins/organization/access";
import type { Role } from "@/lib/schemas/role";
import { roleMay, roles } from "@/lib/schemas/role";

/** What better-auth decides by itself: who changes the team. Everything else is decided in lib/db. */
export const accessControl = createAccessControl(defaultStatements);

const manages = accessControl.newRole({
  organization: ["update"],
  member: ["create", "update", "delete"],
  invitation: ["create", "cancel"],
});
const belongs = accessControl.newRole({ organization: [], member: [], invitation: [] });

type TeamRole = typeof manages | typeof belongs;

/** Read off the one list of roles and rights. */
export const teamRoles = Object.fromEntries(
  roles.map((role) => [role, roleMay(role, "team:manage") ? manages : belongs]),
) as Record<Role, TeamRole>;
