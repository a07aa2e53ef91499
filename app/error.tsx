"use client";

import { MessagePage } from "@/components/shell/message-page";
import { Button } from "@/components/ui/button";

export default function PageError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <MessagePage title="This page could not be drawn">
      <p>
        The server or the browser stopped while preparing it. What you had saved is unharmed. Try again; if it
        happens once more, tell whoever runs this server
        {error.digest ? (
          <>
            {" "}
            the number <code className="text-ink font-mono">{error.digest}</code>, which is in its log
          </>
        ) : null}
        .
      </p>
      <Button onClick={reset}>Try again</Button>
    </MessagePage>
  );
}
