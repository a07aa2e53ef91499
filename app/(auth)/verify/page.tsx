import type { Metadata, Route } from "next";
import Link from "next/link";
import { ResendLink } from "@/components/auth/resend-link";
import { safeNext } from "@/lib/client/safe-next";

export const metadata: Metadata = { title: "Confirm your address" };

interface Props {
  searchParams: Promise<{ email?: string | string[]; next?: string | string[] }>;
}

export default async function VerifyPage({ searchParams }: Props) {
  const { email, next: asked } = await searchParams;
  const next = safeNext(typeof asked === "string" ? asked : null, "/projects");
  return (
    <>
      <h1 className="text-xl">Confirm your address</h1>
      {typeof email === "string" ? (
        <>
          <p className="text-ink-soft">
            We sent a message to <strong className="text-ink font-semibold break-all">{email}</strong>. Open
            the link in it to go on; it holds for an hour.
          </p>
          <ResendLink email={email} next={next} />
        </>
      ) : (
        <p className="text-ink-soft">
          Open the link in the message we sent to go on. Sign in to have it sent again.
        </p>
      )}
      <Link
        className="prose-link self-start text-sm"
        href={`/sign-in?next=${encodeURIComponent(next)}` as Route}
      >
        Go to sign-in
      </Link>
    </>
  );
}
