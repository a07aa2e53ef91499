"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { reviewKey } from "@/lib/client/review";

/** One act of a review: does it, says so, and reads anew what depends on it. */
export function useReviewAct<V>(projectId: string, act: (input: V) => Promise<unknown>, said: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: act,
    onSuccess: () => {
      if (said) toast.success(said);
    },
    onError: (error) => toast.error(errorMessage(error)),
    onSettled: () => client.invalidateQueries({ queryKey: reviewKey(projectId) }),
  });
}
