"use client";

import { useState } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { Select } from "@/components/ui/select";
import type { Role } from "@/lib/schemas/role";
import { ROLE_OPTIONS } from "./role-words";
import { useChangeRole, useRemove } from "./use-team";

export interface Member {
  id: string;
  userId: string;
  role: string;
  user: { name: string; email: string };
}

interface Props {
  members: readonly Member[];
  /** The person who looks. */
  userId: string;
  mayManage: boolean;
}

/** Who is in the team and as what; owners change roles and remove people here. */
export function MembersTable({ members, userId, mayManage }: Props) {
  const change = useChangeRole();
  const remove = useRemove();
  const [leaving, setLeaving] = useState<Member | null>(null);

  return (
    <div
      className="scroll-hint border-rule-line relative overflow-x-auto border-y"
      tabIndex={0}
      role="region"
      aria-label="Members, scrolls sideways"
    >
      <table className="w-full text-sm" aria-label="Members">
        <thead>
          <tr className="border-field-line text-ink-soft h-8 border-b text-left">
            <th scope="col" className="px-2 font-medium">
              Name
            </th>
            <th scope="col" className="px-2 font-medium">
              E-mail address
            </th>
            <th scope="col" className="w-44 px-2 font-medium">
              Role
            </th>
            <th scope="col" className="w-28 px-2 font-medium">
              <span className="sr-only">Acts</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {members.map((member) => (
            <tr key={member.id} className="border-rule-line/60 h-10 border-b last:border-b-0">
              <td className="px-2">
                <span className="flex items-center gap-2">
                  {member.user.name}
                  {member.userId === userId ? <Badge>you</Badge> : null}
                </span>
              </td>
              <td className="text-ink-soft px-2 whitespace-nowrap">{member.user.email}</td>
              <td className="px-2">
                {mayManage ? (
                  <Select
                    label={`Role of ${member.user.name}`}
                    labelHidden
                    options={ROLE_OPTIONS}
                    value={member.role}
                    disabled={change.isPending}
                    onChange={(event) =>
                      change.mutate({ memberId: member.id, role: event.target.value as Role })
                    }
                  />
                ) : (
                  member.role
                )}
              </td>
              <td className="px-2 text-right">
                {mayManage && member.userId !== userId ? (
                  <Button
                    variant="quiet"
                    aria-label={`Remove ${member.user.name}`}
                    onClick={() => setLeaving(member)}
                  >
                    Remove
                  </Button>
                ) : null}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <ConfirmDialog
        open={leaving !== null}
        onOpenChange={(open) => {
          if (!open) setLeaving(null);
        }}
        title={`Remove ${leaving?.user.name ?? ""} from the team?`}
        description="They lose access at once. What they wrote, flagged and signed stays with their name. You can invite them again."
        confirm="Remove"
        danger
        busy={remove.isPending}
        onConfirm={() => {
          if (leaving) remove.mutate(leaving.id, { onSettled: () => setLeaving(null) });
        }}
      />
    </div>
  );
}
