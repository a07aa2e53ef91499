import Link from "next/link";
import { BounceSketch } from "@/components/landing/bounce-sketch";
import { Cautions } from "@/components/landing/cautions";
import { Mark } from "@/components/shell/mark";
import { LinkButton } from "@/components/ui/link-button";
import { currentSigned } from "@/lib/auth/require-actor";

const WORK = [
  {
    who: "Before layout",
    what: "Draw the stackup to scale, set a target for each class of net, and read which width on which layer meets it, by which formula and within which range.",
  },
  {
    who: "After routing",
    what: "Bring in the routed nets, run the rules over every path at every corner, and see which ring, overshoot or dip back, by how much, and which bounce does it.",
  },
  {
    who: "At sign-off",
    what: "Flag, discuss and waive with a reason that expires. A revision is released with the run that allowed it, and says what stands in its way until then.",
  },
  {
    who: "At the fabricator",
    what: "The fabricator sees the impedance-control note that was sent to them, and nothing else.",
  },
];

export default async function LandingPage() {
  const signedIn = await currentSigned();
  return (
    <div className="mx-auto flex min-h-dvh max-w-6xl flex-col px-6 py-6">
      <header className="flex items-center justify-between gap-4">
        <span className="flex items-center gap-2 font-semibold">
          <Mark size={28} />
          Ringfence
        </span>
        <nav aria-label="Start" className="flex items-center gap-5 text-sm">
          <Link className="prose-link" href="/validation">
            Validation
          </Link>
          {signedIn ? null : (
            <LinkButton variant="primary" href="/sign-in">
              Sign in
            </LinkButton>
          )}
        </nav>
      </header>

      <main className="grid flex-1 items-center gap-x-12 gap-y-10 py-12 lg:grid-cols-[minmax(0,5fr)_minmax(0,6fr)]">
        <section className="flex flex-col gap-6">
          <h1 className="text-xl font-semibold">Keep every net inside its rules</h1>
          <p className="text-ink-soft max-w-prose text-lg">
            Signal integrity for the whole board and the whole team: from the first stackup sketch to the note
            the fabricator builds by.
          </p>
          <div className="flex flex-wrap gap-3">
            {signedIn ? (
              <LinkButton size="md" variant="primary" href={"/projects"}>
                Open your projects
              </LinkButton>
            ) : (
              <>
                <LinkButton size="md" variant="primary" href="/sign-in">
                  Sign in
                </LinkButton>
                <LinkButton size="md" href="/sign-up">
                  Make an account
                </LinkButton>
              </>
            )}
          </div>
          <dl className="border-rule-line mt-4 flex flex-col gap-4 border-t pt-6">
            {WORK.map((entry) => (
              <div key={entry.who} className="grid gap-x-6 sm:grid-cols-[9rem_1fr]">
                <dt className="font-medium">{entry.who}</dt>
                <dd className="text-ink-soft text-sm">{entry.what}</dd>
              </div>
            ))}
          </dl>
        </section>
        <figure className="flex flex-col gap-3">
          <BounceSketch />
          <figcaption className="text-ink-soft text-sm">
            A 17 Ω driver on an open 50 Ω line. What travels out is copper, what comes back is violet; their
            sum at the receiver breaks its limit for two line delays.
          </figcaption>
        </figure>
      </main>

      <Cautions />
    </div>
  );
}
