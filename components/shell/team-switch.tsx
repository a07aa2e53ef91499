"use client";

import { ChevronDown } from "lucide-react";
import Link from "next/link";
import { Button } from "@/components/ui/button";
import { Menu, MenuChoice, MenuItem, MenuSeparator } from "@/components/ui/menu";
import { toast } from "@/components/ui/toast";
import { authMessage } from "@/lib/client/auth-messages";
import { startAnew } from "@/lib/client/start-anew";
import type { ShellTeam } from "./types";

/** The team one works in, and the others one belongs to. */
export function TeamSwitch({ teams, active }: { teams: readonly ShellTeam[]; active: ShellTeam | null }) {
  async function go(organizationId: string) {
    // Loaded when it is needed: few change teams on the page that they opened.
    const { authClient } = await import("@/lib/client/auth");
    const { error } = await authClient.organization.setActive({ organizationId });
    if (error) return void toast.error(authMessage(error));
    // Whatever is on screen belongs to the other team: begin anew.
    startAnew("/projects");
  }

  return (
    <Menu
      trigger={
        <Button variant="quiet" aria-label={active ? `Team ${active.name}` : "Choose a team"}>
          <span className="max-w-44 truncate">{active?.name ?? "Choose a team"}</span>
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      {teams.length > 0 ? (
        <MenuChoice
          label="Teams"
          value={active?.id ?? ""}
          onValueChange={(id) => void go(id)}
          options={teams.map((team) => ({ value: team.id, label: `${team.name}, ${team.role}` }))}
        />
      ) : null}
      <MenuSeparator />
      <MenuItem asChild>
        <Link href={"/create-team"}>Make a team</Link>
      </MenuItem>
    </Menu>
  );
}
