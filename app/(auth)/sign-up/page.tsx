import type { Metadata, Route } from "next";
import Link from "next/link";
import { SignUpForm } from "@/components/auth/sign-up-form";
import { safeNext } from "@/lib/client/safe-next";

export const metadata: Metadata = { title: "Make an account" };

interface Props {
  searchParams: Promise<{ next?: string | string[] }>;
}

export default async function SignUpPage({ searchParams }: Props) {
  const { next: asked } = await searchParams;
  const next = safeNext(typeof asked === "string" ? asked : null, "/projects");
  return (
    <>
      <h1 className="text-xl">Make an account</h1>
      <SignUpForm next={next} />
      <p className="text-sm">
        Already have one?{" "}
        <Link className="prose-link" href={`/sign-in?next=${encodeURIComponent(next)}` as Route}>
          Sign in
        </Link>
      </p>
    </>
  );
}
