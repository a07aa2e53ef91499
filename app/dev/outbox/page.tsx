import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { PageHeader } from "@/components/ui/page-header";
import { readOutboxPage } from "@/lib/auth/outbox";

export const metadata: Metadata = { title: "Outbox", referrer: "no-referrer" };

const TIME = new Intl.DateTimeFormat("en-GB", { dateStyle: "medium", timeStyle: "medium", timeZone: "UTC" });

/** Mail that was kept here instead of being sent; exists only where somebody tries the product out. */
export default async function OutboxPage() {
  const messages = await readOutboxPage();
  if (!messages) notFound();
  return (
    <main className="mx-auto w-full max-w-3xl px-6 py-10">
      <PageHeader
        title="Outbox"
        description="No mail server is set, so messages are kept here. Newest first."
      />
      {messages.length === 0 ? <p className="text-ink-soft">No message yet.</p> : null}
      <ol className="flex flex-col gap-6">
        {messages.map((message) => (
          <li key={message.id} className="border-rule-line bg-sheet border p-4">
            <h2 className="font-semibold break-words">{message.subject}</h2>
            <p className="text-ink-soft text-sm break-words">
              To {message.recipient}, {TIME.format(message.at)} UTC
            </p>
            <pre className="mt-3 text-sm break-words whitespace-pre-wrap">
              {message.text.split(ADDRESS).map((part, index) =>
                index % 2 === 1 ? (
                  <a key={index} className="prose-link break-all" href={part}>
                    {part}
                  </a>
                ) : (
                  part
                ),
              )}
            </pre>
          </li>
        ))}
      </ol>
    </main>
  );
}

/** Web addresses, kept by `split` because they are a group. */
const ADDRESS = /(https?:\/\/\S+)/;
