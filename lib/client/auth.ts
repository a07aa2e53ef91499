import { organizationClient } from "better-auth/client/plugins";
import { createAccessControl } from "better-auth/plugins/access";
import { defaultStatements, memberAc, ownerAc } from "better-auth/plugins/organization/access";
import { createAuthClient } from "better-auth/react";
import type { Role } from "@/lib/schemas/role";

const ac = createAccessControl(defaultStatements);

// Only the names matter here: the browser hides what the server would refuse, it never decides.
const member = ac.newRole(memberAc.statements);
const roles = {
  owner: ac.newRole(ownerAc.statements),
  designer: member,
  reviewer: member,
  manufacturer: member,
} satisfies Record<Role, typeof member | ReturnType<typeof ac.newRole>>;

/** Talks to app/api/auth from the browser. */
export const authClient = createAuthClient({ plugins: [organizationClient({ ac, roles })] });
