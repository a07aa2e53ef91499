import { type ReactNode, Suspense } from "react";
import { Header } from "./header";
import { Rail } from "./rail";
import type { ShellTeam, ShellUser } from "./types";

interface Props {
  user: ShellUser;
  teams: readonly ShellTeam[];
  activeTeam: ShellTeam | null;
  mayReadAudit: boolean;
  children: ReactNode;
}

/** What surrounds every page of a team: the header, the rail, the place for the sheet. */
export function DeskShell({ user, teams, activeTeam, mayReadAudit, children }: Props) {
  return (
    <div className="flex min-h-dvh flex-col">
      <Header user={user} teams={teams} activeTeam={activeTeam} home="/projects" />
      <div className="flex min-w-0 flex-1 flex-col lg:flex-row">
        <Suspense>
          <Rail mayReadAudit={mayReadAudit} />
        </Suspense>
        <div className="flex min-w-0 flex-1 flex-col">{children}</div>
      </div>
    </div>
  );
}
