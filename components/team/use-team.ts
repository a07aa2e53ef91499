"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { toast } from "@/components/ui/toast";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import type { Role } from "@/lib/schemas/role";

interface Answer<T> {
  data: T | null;
  error: { code?: string; message?: string; status?: number } | null;
}

/** The members of the team and its open invitations. */
export function useTeam() {
  return useQuery({
    queryKey: ["team"],
    queryFn: async () => {
      const { data, error } = await authClient.organization.getFullOrganization();
      if (error) throw new Error(authMessage(error));
      if (!data) throw new Error("No team is chosen. Choose one at the top, or make one.");
      return data;
    },
  });
}

/** One change to the team: does it, says so, and reads the team anew. */
function useTeamChange<V>(change: (variables: V) => Promise<Answer<unknown>>, said: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (variables: V) => {
      const { error } = await change(variables);
      if (error) throw new Error(authMessage(error));
    },
    onSuccess: () => {
      toast.success(said);
      return client.invalidateQueries({ queryKey: ["team"] });
    },
    onError: (error) => toast.error(error.message),
  });
}

export const useInvite = () =>
  useTeamChange(
    (invitation: { email: string; role: Role }) => authClient.organization.inviteMember(invitation),
    "The invitation is on its way.",
  );

export const useRevoke = () =>
  useTeamChange(
    (invitationId: string) => authClient.organization.cancelInvitation({ invitationId }),
    "The invitation is withdrawn.",
  );

export const useChangeRole = () =>
  useTeamChange(
    (change: { memberId: string; role: Role }) => authClient.organization.updateMemberRole(change),
    "The role is changed.",
  );

export const useRemove = () =>
  useTeamChange(
    (memberIdOrEmail: string) => authClient.organization.removeMember({ memberIdOrEmail }),
    "This person no longer belongs to the team.",
  );
