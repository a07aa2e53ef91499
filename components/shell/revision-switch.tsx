"use client";

import { ChevronDown } from "lucide-react";
import { usePathname, useRouter, useSearchParams } from "next/navigation";
import type { Route } from "next";
import { Button } from "@/components/ui/button";
import { Menu, MenuChoice } from "@/components/ui/menu";
import { REVISION_PARAM } from "@/lib/client/revision-param";

export interface ShellRevision {
  /** Its letter: A, B, C… */
  letter: string;
  state: "draft" | "released";
}

/** Given newest first. Chooses the revision that the pages of a project show; the address carries the choice. */
export function RevisionSwitch({ revisions }: { revisions: readonly ShellRevision[] }) {
  const router = useRouter();
  const pathname = usePathname();
  const params = useSearchParams();
  const draft = revisions.find((revision) => revision.state === "draft") ?? revisions[0];
  const letter = params.get(REVISION_PARAM) ?? draft?.letter;
  const current = revisions.find((revision) => revision.letter === letter);
  if (!draft) return null;

  function go(next: string) {
    const search = new URLSearchParams(params);
    if (next === draft?.letter) search.delete(REVISION_PARAM);
    else search.set(REVISION_PARAM, next);
    router.push(`${pathname}${search.size > 0 ? `?${search.toString()}` : ""}` as Route);
  }

  return (
    <Menu
      trigger={
        <Button variant="quiet">
          {current ? `Revision ${current.letter}, ${current.state}` : `Revision ${letter ?? "unknown"}`}
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      <MenuChoice
        label="Revision"
        value={letter ?? ""}
        onValueChange={go}
        options={revisions.map((revision) => ({
          value: revision.letter,
          label: `${revision.letter}, ${revision.state}`,
        }))}
      />
    </Menu>
  );
}
