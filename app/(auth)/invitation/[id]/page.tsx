import type { Metadata } from "next";
import { AcceptInvitation } from "@/components/auth/accept-invitation";
import { LinkButton } from "@/components/ui/link-button";
import { currentSigned } from "@/lib/auth/require-actor";

export const metadata: Metadata = { title: "Invitation", referrer: "no-referrer" };

interface Props {
  params: Promise<{ id: string }>;
}

export default async function InvitationPage({ params }: Props) {
  const { id } = await params;
  const signedIn = await currentSigned();
  const back = encodeURIComponent(`/invitation/${id}`);
  return (
    <>
      <h1 className="text-xl">Invitation</h1>
      {signedIn ? (
        <>
          <AcceptInvitation invitationId={id} />
          <p className="text-ink-soft text-sm">
            You are signed in as <span className="break-all">{signedIn.person.email}</span>.
          </p>
        </>
      ) : (
        <>
          <p className="text-ink-soft">
            Sign in with the address that this invitation was sent to, or make an account with it, to see who
            asks you to join and to answer.
          </p>
          <div className="flex flex-wrap gap-2">
            <LinkButton size="md" variant="primary" href={`/sign-in?next=${back}`}>
              Sign in
            </LinkButton>
            <LinkButton size="md" href={`/sign-up?next=${back}`}>
              Make an account
            </LinkButton>
          </div>
        </>
      )}
    </>
  );
}
