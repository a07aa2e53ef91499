import type { Metadata } from "next";
import Link from "next/link";
import { ResetForm } from "@/components/auth/reset-form";

export const metadata: Metadata = { title: "Choose a new password", referrer: "no-referrer" };

interface Props {
  searchParams: Promise<{ token?: string | string[] }>;
}

export default async function ResetPage({ searchParams }: Props) {
  const { token } = await searchParams;
  return (
    <>
      <h1 className="text-xl">Choose a new password</h1>
      {typeof token === "string" && token !== "" ? (
        <ResetForm token={token} />
      ) : (
        <p className="text-ink-soft">
          This link was used already, has expired, or is incomplete.{" "}
          <Link className="prose-link" href={"/forgot"}>
            Ask for a new one
          </Link>
        </p>
      )}
    </>
  );
}
