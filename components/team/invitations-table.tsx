"use client";

import { Button } from "@/components/ui/button";
import { useRevoke } from "./use-team";

export interface OpenInvitation {
  id: string;
  email: string;
  role: string;
  expiresAt: Date | string;
}

const DAY = new Intl.DateTimeFormat("en-GB", { dateStyle: "medium", timeZone: "UTC" });

/** Invitations that were sent and not answered yet. */
export function InvitationsTable({
  invitations,
  mayManage,
}: {
  invitations: readonly OpenInvitation[];
  mayManage: boolean;
}) {
  const revoke = useRevoke();
  if (invitations.length === 0) return <p className="text-ink-soft text-sm">No invitation is open.</p>;
  return (
    <ul className="border-rule-line bg-sheet border-y text-sm">
      {invitations.map((invitation) => (
        <li
          key={invitation.id}
          className="border-rule-line/60 flex min-h-10 flex-wrap items-center gap-x-4 border-b px-2 last:border-b-0"
        >
          <span className="min-w-0 break-words">{invitation.email}</span>
          <span className="text-ink-soft">
            as {invitation.role}, until {DAY.format(new Date(invitation.expiresAt))}
          </span>
          {mayManage ? (
            <Button
              variant="quiet"
              className="ml-auto"
              busy={revoke.isPending}
              aria-label={`Withdraw the invitation of ${invitation.email}`}
              onClick={() => revoke.mutate(invitation.id)}
            >
              Withdraw
            </Button>
          ) : null}
        </li>
      ))}
    </ul>
  );
}
