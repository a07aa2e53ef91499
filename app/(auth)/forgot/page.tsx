import type { Metadata } from "next";
import Link from "next/link";
import { ForgotForm } from "@/components/auth/forgot-form";

export const metadata: Metadata = { title: "Reset the password" };

export default function ForgotPage() {
  return (
    <>
      <h1 className="text-xl">Reset the password</h1>
      <p className="text-ink-soft">We send a link with which you choose a new one.</p>
      <ForgotForm />
      <Link className="prose-link self-start text-sm" href={"/sign-in"}>
        Back to sign-in
      </Link>
    </>
  );
}
