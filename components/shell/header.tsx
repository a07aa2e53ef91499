import type { Route } from "next";
import Link from "next/link";
import { AccountMenu } from "./account-menu";
import { Mark } from "./mark";
import { TeamSwitch } from "./team-switch";
import type { ShellTeam, ShellUser } from "./types";
import { UnitSwitch } from "./unit-switch";

interface Props {
  user: ShellUser;
  teams: readonly ShellTeam[];
  activeTeam: ShellTeam | null;
  home: string;
  /** Lengths are of no use to pages that show none. */
  withUnits?: boolean;
}

/** The bar on top: where one is, in which team, in which unit, as whom. */
export function Header({ user, teams, activeTeam, home, withUnits = true }: Props) {
  return (
    <header className="border-rule-line bg-paper sticky top-0 z-30 flex h-12 items-center gap-3 border-b px-3 print:hidden">
      <a
        href="#sheet"
        className="focus:bg-sheet sr-only focus:not-sr-only focus:absolute focus:z-50 focus:rounded focus:px-3 focus:py-2"
      >
        Skip to the sheet
      </a>
      <Link href={home as Route} className="flex items-center gap-2 font-semibold">
        <Mark />
        <span className="max-sm:sr-only">Ringfence</span>
      </Link>
      <TeamSwitch teams={teams} active={activeTeam} />
      <div className="ml-auto flex items-center gap-2">
        {withUnits ? <UnitSwitch /> : null}
        <AccountMenu user={user} role={activeTeam?.role ?? null} />
      </div>
    </header>
  );
}
