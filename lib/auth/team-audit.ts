import "server-only";
import type { OrganizationOptions } from "better-auth/plugins/organization";
import { z } from "zod";
import { recordAudit, type AuditInput } from "@/lib/db/audit";
import { readRole } from "@/lib/db/membership";

interface Person {
  id: string;
  email: string;
  name: string;
}

/** Changes of a team, written to its audit log by whoever made them. */
export const teamAudit: NonNullable<OrganizationOptions["organizationHooks"]> = {
  afterCreateOrganization: ({ organization, user }) =>
    write(user, organization.id, "team.create", "team", organization.id, { name: organization.name }),
  afterUpdateOrganization: async ({ organization, user }) => {
    if (organization)
      await write(user, organization.id, "team.update", "team", organization.id, { name: organization.name });
  },
  afterCreateInvitation: ({ invitation, inviter, organization }) =>
    write(inviter, organization.id, "invitation.create", "invitation", invitation.id, {
      email: invitation.email,
      role: invitation.role,
    }),
  afterCancelInvitation: ({ invitation, cancelledBy, organization }) =>
    write(cancelledBy, organization.id, "invitation.withdraw", "invitation", invitation.id, {
      email: invitation.email,
    }),
  afterAcceptInvitation: ({ invitation, user, organization }) =>
    write(user, organization.id, "invitation.accept", "invitation", invitation.id, { role: invitation.role }),
  afterRejectInvitation: ({ invitation, user, organization }) =>
    write(user, organization.id, "invitation.decline", "invitation", invitation.id, {}),
};

/** Changes whose hooks do not say who made them: written from the answered request. */
export async function auditMemberChange(path: string, person: Person, returned: unknown): Promise<void> {
  const action = MEMBER_CHANGES[path];
  const member = memberOf(returned);
  if (!action || !member) return;
  await write(person, member.organizationId, action, "member", member.userId, { role: member.role });
}

const MEMBER_CHANGES: Readonly<Record<string, string>> = {
  "/organization/update-member-role": "member.role",
  "/organization/remove-member": "member.remove",
  "/organization/leave": "member.leave",
};

const memberShape = z.object({ organizationId: z.string(), userId: z.string(), role: z.string() });

function memberOf(returned: unknown): z.infer<typeof memberShape> | null {
  return (
    memberShape.or(z.object({ member: memberShape }).transform(({ member }) => member)).safeParse(returned)
      .data ?? null
  );
}

async function write(
  person: Person,
  teamId: string,
  action: string,
  subjectKind: string,
  subjectId: string,
  detail: AuditInput["detail"],
): Promise<void> {
  const role = (await readRole(person.id, teamId)) ?? "manufacturer";
  await recordAudit(
    { kind: "user", userId: person.id, teamId, role, email: person.email, name: person.name },
    { action, subjectKind, subjectId, projectId: null, detail },
  );
}
