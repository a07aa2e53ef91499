"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { TableSkeleton } from "@/components/ui/skeleton";
import { toast } from "@/components/ui/toast";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { startAnew } from "@/lib/client/start-anew";
import { roles } from "@/lib/schemas/role";
import { InvitationsTable } from "./invitations-table";
import { InviteForm } from "./invite-form";
import { MembersTable } from "./members-table";
import { ROLE_WORDS } from "./role-words";
import { useTeam } from "./use-team";

/** The team: its people, its open invitations, and what each role may do. */
export function TeamView({ userId, mayManage }: { userId: string; mayManage: boolean }) {
  const team = useTeam();
  if (team.isPending) return <TableSkeleton rows={4} label="Reading the team" />;
  if (team.isError) return <p role="alert">{team.error.message}</p>;
  const open = team.data.invitations.filter((invitation) => invitation.status === "pending");
  return (
    <div className="flex flex-col gap-8">
      <MembersTable members={team.data.members} userId={userId} mayManage={mayManage} />
      <section aria-labelledby="invitations" className="flex flex-col gap-4">
        <h2 id="invitations" className="text-lg">
          Invitations
        </h2>
        {mayManage ? <InviteForm /> : null}
        <InvitationsTable invitations={open} mayManage={mayManage} />
      </section>
      <section aria-labelledby="roles" className="flex flex-col gap-2">
        <h2 id="roles" className="text-lg">
          Roles
        </h2>
        <dl className="grid max-w-prose gap-x-4 gap-y-1 text-sm sm:grid-cols-[8rem_1fr]">
          {roles.map((role) => (
            <div key={role} className="contents">
              <dt className="font-medium">{role}</dt>
              <dd className="text-ink-soft">{ROLE_WORDS[role]}</dd>
            </div>
          ))}
        </dl>
      </section>
      <Leave organizationId={team.data.id} name={team.data.name} />
    </div>
  );
}

function Leave({ organizationId, name }: { organizationId: string; name: string }) {
  const [asking, setAsking] = useState(false);
  const [busy, setBusy] = useState(false);

  async function leave() {
    setBusy(true);
    const { error } = await authClient.organization.leave({ organizationId });
    setBusy(false);
    setAsking(false);
    if (error) toast.error(authMessage(error));
    else startAnew("/projects");
  }

  return (
    <section className="border-rule-line border-t pt-4">
      <Button variant="danger" onClick={() => setAsking(true)}>
        Leave the team
      </Button>
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title={`Leave ${name}?`}
        description="You lose access to its projects at once. An owner can invite you again."
        confirm="Leave"
        danger
        busy={busy}
        onConfirm={() => void leave()}
      />
    </section>
  );
}
