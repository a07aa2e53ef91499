import type { Metadata } from "next";
import { CreateTeamForm } from "@/components/auth/create-team-form";
import { requireSigned } from "@/lib/auth/require-actor";

export const metadata: Metadata = { title: "Make a team" };

export default async function NewTeamPage() {
  const { email } = (await requireSigned()).person;
  return (
    <>
      <h1 className="text-xl">Make a team</h1>
      <p className="text-ink-soft">
        Projects belong to a team. You become its owner and can invite others, each with a role. To join a
        team that exists, ask its owner to invite{" "}
        <strong className="text-ink font-semibold break-all">{email}</strong> and open the link in that
        message.
      </p>
      <CreateTeamForm />
    </>
  );
}
