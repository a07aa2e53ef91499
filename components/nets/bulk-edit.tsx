"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { NetChange, NetRow } from "@/lib/client/nets";
import { scopeKinds } from "@/lib/schemas/net";
import { counted, KIND_WORDS } from "./net-words";

interface Props {
  nets: readonly NetRow[];
  classes: readonly { lineageId: string; name: string }[];
  busy: boolean;
  onApply: (change: NetChange) => void;
  onClear: () => void;
}

/** Keeps what the nets have. */
const KEEP = "";
const NONE = "none";

/** One change to all ticked nets: class, scope with its reason, match group. What is left alone stays. */
export function BulkEdit({ nets, classes, busy, onApply, onClear }: Props) {
  const [netClass, setNetClass] = useState(KEEP);
  const [scope, setScope] = useState(KEEP);
  const [reason, setReason] = useState("");
  const [group, setGroup] = useState("");
  const [refusal, setRefusal] = useState<string | null>(null);
  const out = scope !== KEEP && scope !== "in";
  const idle = netClass === KEEP && scope === KEEP && group.trim() === "";

  function apply() {
    if (out && reason.trim() === "") {
      setRefusal("Say why these nets are left out.");
      return;
    }
    setRefusal(null);
    onApply({
      ...(netClass === KEEP ? {} : { classLineageId: netClass === NONE ? null : netClass }),
      ...(scope === KEEP
        ? {}
        : scope === "in"
          ? { scope: "in", scopeKind: "signal", scopeReason: "" }
          : {
              scope: "out",
              scopeKind: scopeKinds.find((kind) => kind === scope) ?? "signal",
              scopeReason: reason.trim(),
            }),
      ...(group.trim() === "" ? {} : { matchGroup: group.trim() === "-" ? null : group.trim() }),
    });
  }

  return (
    <form
      aria-label="Change the ticked nets"
      className="border-copper bg-sheet flex flex-wrap items-start gap-3 border-l-2 px-3 py-2"
      onSubmit={(event) => {
        event.preventDefault();
        apply();
      }}
    >
      <p className="w-full text-sm font-medium sm:w-auto sm:self-center" aria-live="polite">
        {counted(nets.length, "net")} ticked
      </p>
      <Select
        label="Class"
        fieldClassName="w-44"
        placeholder="Keep as it is"
        value={netClass}
        onChange={(event) => setNetClass(event.target.value)}
        options={[
          ...classes.map(({ lineageId, name }) => ({ value: lineageId, label: name })),
          { value: NONE, label: "No class" },
        ]}
      />
      <Select
        label="Scope"
        fieldClassName="w-44"
        placeholder="Keep as it is"
        value={scope}
        onChange={(event) => setScope(event.target.value)}
        options={[
          { value: "in", label: "In scope" },
          ...scopeKinds
            .filter((kind) => kind !== "signal")
            .map((kind) => ({ value: kind, label: `Out: ${KIND_WORDS[kind]?.toLowerCase()}` })),
          { value: "signal", label: "Out: other signal" },
        ]}
      />
      {out ? (
        <Input
          label="Reason"
          fieldClassName="w-64"
          maxLength={300}
          value={reason}
          error={refusal}
          onChange={(event) => setReason(event.target.value)}
        />
      ) : null}
      <Input
        label="Match group"
        fieldClassName="w-40"
        placeholder="Keep; - for none"
        maxLength={120}
        value={group}
        onChange={(event) => setGroup(event.target.value)}
      />
      <div className="flex gap-2 self-end pb-px">
        <Button type="submit" variant="primary" busy={busy} disabled={idle}>
          Change {counted(nets.length, "net")}
        </Button>
        <Button variant="quiet" onClick={onClear}>
          Untick all
        </Button>
      </div>
    </form>
  );
}
