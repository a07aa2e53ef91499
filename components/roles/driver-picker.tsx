"use client";

import { useMemo } from "react";
import { Checkbox } from "@/components/ui/checkbox";
import type { DraftProposals } from "@/lib/schemas/name-proposals";
import { activeParts, roleRow, type RoleRow } from "./role-rows";

interface Props {
  pins: DraftProposals["pins"];
  rules: readonly RoleRow[];
  onChange: (rules: RoleRow[]) => void;
}

/** The largest parts are those that people mean. */
const SHOWN = 12;

/** The common case in one click: a part whose pins drive, and that all other parts receive. */
export function DriverPicker({ pins, rules, onChange }: Props) {
  const parts = useMemo(() => activeParts(pins).slice(0, SHOWN), [pins]);
  if (parts.length === 0) return null;
  const drives = (reference: string) =>
    rules.find((rule) => isWhole(rule, reference) && rule.role === "driver");
  const rest = rules.filter(
    (rule) => rule.role === "receiver" && (isWhole(rule, "U*") || isWhole(rule, "J*")),
  );

  function toggle(reference: string, on: boolean) {
    const present = drives(reference);
    if (!on) onChange(rules.filter((rule) => rule !== present));
    // Before the rules for the rest, which would catch its pins.
    else onChange([roleRow({ referencePattern: reference, role: "driver" }), ...rules]);
  }
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="mb-1 text-sm font-medium">Parts that drive</legend>
      <div className="flex flex-wrap gap-x-6 gap-y-2">
        {parts.map(({ reference, partNumber, pins: count }) => (
          <Checkbox
            key={reference}
            label={`${reference}${partNumber ? `, ${partNumber}` : ""}`}
            hint={`${count.toLocaleString("en")} pin${count === 1 ? "" : "s"}`}
            checked={drives(reference) !== undefined}
            onCheckedChange={(on) => toggle(reference, on)}
          />
        ))}
      </div>
      <Checkbox
        label="All other pins of U and J parts receive"
        checked={rest.length > 0}
        onCheckedChange={(on) =>
          onChange(
            on
              ? [
                  ...rules,
                  roleRow({ referencePattern: "U*", role: "receiver" }),
                  roleRow({ referencePattern: "J*", role: "receiver" }),
                ]
              : rules.filter((rule) => !rest.includes(rule)),
          )
        }
      />
    </fieldset>
  );
}

/** A rule over whole parts of this reference, which asks for nothing else. */
function isWhole(rule: RoleRow, reference: string): boolean {
  return (
    rule.referencePattern === reference &&
    rule.partNumberPattern === "*" &&
    rule.pinPattern === "*" &&
    rule.netPattern === "*" &&
    rule.modelLineageId === null
  );
}
