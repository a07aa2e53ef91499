"use client";

/** Shown when the outermost layout itself failed; it can rely on nothing but the browser. */
export default function GlobalError({ reset }: { error: Error; reset: () => void }) {
  return (
    <html lang="en">
      <body>
        <main>
          <h1>Ringfence could not be drawn</h1>
          <p>What you had saved is unharmed. Try again, or tell whoever runs this server.</p>
          <button type="button" onClick={reset}>
            Try again
          </button>
        </main>
      </body>
    </html>
  );
}
