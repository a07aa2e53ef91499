import type { Metadata } from "next";
import type { Route } from "next";
import Link from "next/link";
import { SignInForm } from "@/components/auth/sign-in-form";
import { listDemoAccounts } from "@/lib/auth/demo-accounts";
import { safeNext } from "@/lib/client/safe-next";

export const metadata: Metadata = { title: "Sign in" };

interface Props {
  searchParams: Promise<{ next?: string | string[] }>;
}

export default async function SignInPage({ searchParams }: Props) {
  const { next: asked } = await searchParams;
  const next = safeNext(typeof asked === "string" ? asked : null, "/projects");
  const onward = next === "/projects" ? "" : `?next=${encodeURIComponent(next)}`;
  return (
    <>
      <h1 className="text-xl">Sign in</h1>
      <SignInForm next={next} demoAccounts={await listDemoAccounts()} />
      <p className="flex flex-wrap justify-between gap-x-6 gap-y-2 text-sm">
        <Link className="prose-link" href={`/sign-up${onward}` as Route}>
          Make an account
        </Link>
        <Link className="prose-link" href={"/forgot"}>
          Reset the password
        </Link>
      </p>
    </>
  );
}
