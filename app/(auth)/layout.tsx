import Link from "next/link";
import type { ReactNode } from "react";
import { Mark } from "@/components/shell/mark";

export default function AuthLayout({ children }: { children: ReactNode }) {
  return (
    <div className="mx-auto flex min-h-dvh w-full max-w-md flex-col px-6 py-10">
      <Link href="/" className="mb-10 flex items-center gap-2 self-start font-semibold">
        <Mark />
        Ringfence
      </Link>
      <main className="flex flex-col gap-6">{children}</main>
    </div>
  );
}
