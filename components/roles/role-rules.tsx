"use client";

import { ArrowDown, ArrowUp, Plus, X } from "lucide-react";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { RoleResult } from "@/lib/formats/pin-roles";
import { pinRoles, type PinRole } from "@/lib/schemas/model";
import { moved, type RoleRow } from "./role-rows";

interface Props {
  rows: readonly RoleRow[];
  result: RoleResult;
  onChange: (rows: RoleRow[]) => void;
  onAdd: () => void;
}

const ROLE_WORDS: Record<PinRole, string> = {
  driver: "Drives",
  receiver: "Receives",
  either: "Drives or receives",
  passive: "Passive",
};

/** The table of patterns that gives pins their roles; the first row that fits a pin decides. */
export function RoleRules({ rows, result, onChange, onAdd }: Props) {
  const set = (key: string, change: Partial<RoleRow>) =>
    onChange(rows.map((row) => (row.key === key ? { ...row, ...change } : row)));
  return (
    <div className="flex flex-col items-start gap-2">
      {rows.length > 0 ? (
        <div
          className="border-rule-line relative w-full overflow-x-auto border-y"
          role="region"
          aria-label="Role rules"
          tabIndex={0}
        >
          <table className="bg-sheet w-full min-w-[720px] text-left text-sm">
            <thead>
              <tr className="text-ink-soft text-xs">
                {["Reference", "Part number", "Pin", "Net", "Role", "Pins", ""].map((name) => (
                  <th key={name} scope="col" className="px-2 py-1 font-normal">
                    {name || <span className="sr-only">Order</span>}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {rows.map((row, index) => (
                <tr key={row.key} className="border-rule-line/60 border-t">
                  <Pattern
                    label={`Reference of rule ${index + 1}`}
                    value={row.referencePattern}
                    onChange={(referencePattern) => set(row.key, { referencePattern })}
                  />
                  <Pattern
                    label={`Part number of rule ${index + 1}`}
                    value={row.partNumberPattern}
                    onChange={(partNumberPattern) => set(row.key, { partNumberPattern })}
                  />
                  <Pattern
                    label={`Pin of rule ${index + 1}`}
                    value={row.pinPattern}
                    onChange={(pinPattern) => set(row.key, { pinPattern })}
                  />
                  <Pattern
                    label={`Net of rule ${index + 1}`}
                    value={row.netPattern}
                    onChange={(netPattern) => set(row.key, { netPattern })}
                  />
                  <td className="px-2 py-1">
                    <Select
                      label={`Role of rule ${index + 1}`}
                      labelHidden
                      fieldClassName="w-44"
                      value={row.role}
                      options={pinRoles.map((role) => ({ value: role, label: ROLE_WORDS[role] }))}
                      onChange={(event) =>
                        set(row.key, {
                          role: pinRoles.find((role) => role === event.target.value) ?? row.role,
                        })
                      }
                    />
                  </td>
                  <td className="px-2 py-1 text-right tabular-nums">
                    {(result.pinsOfRule[index] ?? 0).toLocaleString("en")}
                  </td>
                  <td className="px-2 py-1">
                    <span className="flex justify-end">
                      <Button
                        variant="quiet"
                        size="icon"
                        aria-label={`Move rule ${index + 1} up`}
                        disabled={index === 0}
                        onClick={() => onChange(moved(rows, index, -1))}
                      >
                        <ArrowUp size={14} aria-hidden="true" />
                      </Button>
                      <Button
                        variant="quiet"
                        size="icon"
                        aria-label={`Move rule ${index + 1} down`}
                        disabled={index === rows.length - 1}
                        onClick={() => onChange(moved(rows, index, 1))}
                      >
                        <ArrowDown size={14} aria-hidden="true" />
                      </Button>
                      <Button
                        variant="quiet"
                        size="icon"
                        aria-label={`Remove rule ${index + 1}`}
                        onClick={() => onChange(rows.filter(({ key }) => key !== row.key))}
                      >
                        <X size={14} aria-hidden="true" />
                      </Button>
                    </span>
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      ) : null}
      <Button onClick={onAdd}>
        <Plus size={14} aria-hidden="true" />
        Add a rule
      </Button>
    </div>
  );
}

function Pattern({
  label,
  value,
  onChange,
}: {
  label: string;
  value: string;
  onChange: (value: string) => void;
}) {
  return (
    <td className="px-2 py-1">
      <Input
        label={label}
        labelHidden
        className="font-mono text-xs"
        maxLength={80}
        spellCheck={false}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        onBlur={(event) => {
          // A pattern left empty means any.
          if (event.target.value.trim() === "") onChange("*");
        }}
      />
    </td>
  );
}
