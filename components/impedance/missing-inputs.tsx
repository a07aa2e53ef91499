import type { Route } from "next";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";

const MISSING = {
  stackup: {
    title: "No signal layers yet",
    words:
      "An impedance needs a trace on a layer and a plane beside it. Start the stackup from a template of 2 to 18 layers.",
    verb: "Go to the stackup",
    place: "stackup",
  },
  classes: {
    title: "No classes yet",
    words:
      "A class says which impedance its nets need, how exactly, and on which layers. Define one with its target.",
    verb: "Go to the classes",
    place: "classes",
  },
  targets: {
    title: "No class has a target impedance",
    words:
      "Give a class its target, such as 50 Ω single-ended or 100 Ω differential, and its widths appear here.",
    verb: "Go to the classes",
    place: "classes",
  },
} as const;

interface Props {
  projectId: string;
  search: string;
  what: keyof typeof MISSING;
}

/** What must be there before a table of impedances makes sense, and where to make it. */
export function MissingInputs({ projectId, search, what }: Props) {
  const { title, words, verb, place } = MISSING[what];
  return (
    <EmptyState
      title={title}
      actions={
        <LinkButton variant="primary" href={`/projects/${projectId}/${place}${search}` as Route}>
          {verb}
        </LinkButton>
      }
    >
      {words}
    </EmptyState>
  );
}
