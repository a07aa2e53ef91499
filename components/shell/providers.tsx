"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { setNonce } from "get-nonce";
import { NuqsAdapter } from "nuqs/adapters/next/app";
import { Tooltip } from "radix-ui";
import { type ReactNode, useState } from "react";
import { Toaster } from "@/components/ui/toast";

/** What every page stands in: server state, URL state, tooltips, messages, the nonce for injected styles. */
export function Providers({ nonce, children }: { nonce: string; children: ReactNode }) {
  const [client] = useState(() => {
    setNonce(nonce);
    return new QueryClient({
      defaultOptions: { queries: { staleTime: 10_000, retry: 1, refetchOnWindowFocus: false } },
    });
  });
  return (
    <QueryClientProvider client={client}>
      <NuqsAdapter>
        <Tooltip.Provider delayDuration={300}>{children}</Tooltip.Provider>
      </NuqsAdapter>
      <Toaster />
    </QueryClientProvider>
  );
}
