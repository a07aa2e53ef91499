"use client";

import { useMutation, useQuery } from "@tanstack/react-query";
import { Button } from "@/components/ui/button";
import { Skeleton } from "@/components/ui/skeleton";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { startAnew } from "@/lib/client/start-anew";
import { FormError } from "./form-error";

/** An invitation as its recipient sees it: the team, the role, yes or no. */
export function AcceptInvitation({ invitationId }: { invitationId: string }) {
  const invitation = useQuery({
    queryKey: ["invitation", invitationId],
    retry: false,
    queryFn: async () => {
      const { data, error } = await authClient.organization.getInvitation({ query: { id: invitationId } });
      if (error) throw new Error(authMessage(error));
      return data;
    },
  });
  const accept = useMutation({
    mutationFn: async (organizationId: string) => {
      const { error } = await authClient.organization.acceptInvitation({ invitationId });
      if (error) throw new Error(authMessage(error));
      await authClient.organization.setActive({ organizationId });
    },
    onSuccess: () => startAnew("/projects"),
  });
  const decline = useMutation({
    mutationFn: async () => {
      const { error } = await authClient.organization.rejectInvitation({ invitationId });
      if (error) throw new Error(authMessage(error));
    },
  });

  if (invitation.isPending) return <Skeleton className="h-24 w-full" />;
  if (invitation.isError) return <FormError message={invitation.error.message} />;
  if (decline.isSuccess) return <p role="status">You declined the invitation. The team can send another.</p>;

  const { organizationName, inviterEmail, role, organizationId } = invitation.data;
  return (
    <>
      <p>
        <span className="break-all">{inviterEmail}</span> asks you to join{" "}
        <strong className="font-semibold">{organizationName}</strong> as {role}.
      </p>
      <FormError message={accept.error?.message ?? decline.error?.message ?? null} />
      <div className="flex flex-wrap gap-2">
        <Button
          variant="primary"
          size="md"
          busy={accept.isPending || accept.isSuccess}
          onClick={() => accept.mutate(organizationId)}
        >
          Join the team
        </Button>
        <Button size="md" busy={decline.isPending} onClick={() => decline.mutate()}>
          Decline
        </Button>
      </div>
    </>
  );
}
