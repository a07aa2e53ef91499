"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { toast } from "@/components/ui/toast";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { apiDelete, apiPost, errorMessage } from "@/lib/client/api";

interface Recipient {
  id: string;
  name: string;
  email: string;
  company: string;
  viewedAt: number | null;
  downloadedAt: number | null;
  acknowledgedAt: number | null;
  acknowledgedBy: string | null;
  acknowledgement: string;
  revokedAt: number | null;
}

interface Props {
  projectId: string;
  releaseId: string;
  recipients: Recipient[];
  mayRelease: boolean;
}

/** Who the note went to and what they did with it. */
export function RecipientsTable({ projectId, releaseId, recipients, mayRelease }: Props) {
  const router = useRouter();
  const [ending, setEnding] = useState<Recipient | null>(null);
  const act = async (work: () => Promise<unknown>, done: string) => {
    try {
      await work();
      toast.success(done);
      router.refresh();
    } catch (error) {
      toast.error(errorMessage(error));
    }
  };
  const endpoint = (recipient: Recipient) =>
    `/projects/${projectId}/releases/${releaseId}/recipients/${recipient.id}`;
  return (
    <section className="print:hidden">
      <h2 className="mb-2 text-lg font-semibold">Recipients</h2>
      <div className="overflow-x-auto" tabIndex={0} role="region" aria-label="Recipients">
        <table className="w-full min-w-[44rem] text-sm">
          <thead>
            <tr className="border-ink border-b text-left">
              <th scope="col" className="py-1.5 pr-3 font-medium">
                Name
              </th>
              <th scope="col" className="py-1.5 pr-3 font-medium">
                Opened
              </th>
              <th scope="col" className="py-1.5 pr-3 font-medium">
                Downloaded
              </th>
              <th scope="col" className="py-1.5 pr-3 font-medium">
                Acknowledged
              </th>
              {mayRelease ? (
                <th scope="col" className="py-1.5 font-medium">
                  Link
                </th>
              ) : null}
            </tr>
          </thead>
          <tbody>
            {recipients.map((recipient) => (
              <tr key={recipient.id} className="border-rule-line border-b align-top">
                <td className="py-2 pr-3">
                  {recipient.name}
                  {recipient.company ? `, ${recipient.company}` : ""}
                  <span className="text-ink-soft block text-xs">{recipient.email}</span>
                </td>
                <td className="py-2 pr-3">{day(recipient.viewedAt)}</td>
                <td className="py-2 pr-3">{day(recipient.downloadedAt)}</td>
                <td className="max-w-xs py-2 pr-3">
                  {recipient.acknowledgedAt === null
                    ? "not yet"
                    : `${day(recipient.acknowledgedAt)}, ${recipient.acknowledgedBy ?? ""}`}
                  {recipient.acknowledgement ? (
                    <q className="text-ink-soft block">{recipient.acknowledgement}</q>
                  ) : null}
                </td>
                {mayRelease ? (
                  <td className="py-1">
                    <div className="flex gap-2">
                      <Button
                        variant="quiet"
                        onClick={() =>
                          void act(
                            () => apiPost(endpoint(recipient)),
                            `A fresh link went to ${recipient.email}.`,
                          )
                        }
                      >
                        {recipient.revokedAt === null ? "Send a fresh link" : "Give access again"}
                      </Button>
                      {recipient.revokedAt === null ? (
                        <Button variant="quiet" onClick={() => setEnding(recipient)}>
                          End access
                        </Button>
                      ) : null}
                    </div>
                  </td>
                ) : null}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <ConfirmDialog
        open={ending !== null}
        onOpenChange={(open) => (open ? undefined : setEnding(null))}
        title={`End the access of ${ending?.name ?? ""}?`}
        description="Their link stops working at once, and the note disappears from their account. What they downloaded stays with them."
        confirm="End access"
        danger
        onConfirm={() => {
          const recipient = ending;
          setEnding(null);
          if (recipient)
            void act(() => apiDelete(endpoint(recipient)), `${recipient.name} can no longer open the note.`);
        }}
      />
    </section>
  );
}

function day(at: number | null): string {
  return at === null ? "not yet" : new Date(at).toISOString().slice(0, 10);
}
