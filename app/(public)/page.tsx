import Link from "next/link";

export default function LandingPage() {
  return (
    <main className="mx-auto max-w-5xl px-6 py-16">
      <h1 className="text-xl">Ringfence</h1>
      <Link className="prose-link" href={"/sign-in" as "/"}>
        Sign in
      </Link>
    </main>
  );
}
