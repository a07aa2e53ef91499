"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useDeferredValue, useMemo, useState } from "react";
import { ImportSteps } from "@/components/import/import-steps";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { TableSkeleton } from "@/components/ui/skeleton";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { confirmProposals, netsKey, proposalsQuery } from "@/lib/client/nets";
import { undoKey } from "@/lib/client/undo";
import { assignRoles } from "@/lib/formats/pin-roles";
import type { DraftProposals } from "@/lib/schemas/name-proposals";
import { DriverPicker } from "./driver-picker";
import { ProposalTable } from "./proposal-tables";
import { BUSES, GROUPS, PAIRS, SCOPES } from "./proposal-columns";
import { pinsOf, roleRow, ruleOf } from "./role-rows";
import { RoleRules } from "./role-rules";
import { confirmedWords, useProposals } from "./use-proposals";

/** After an import: which pins drive, and what the names of nets suggest, each to be confirmed. */
export function RolesView({ projectId }: { projectId: string }) {
  const { data, error } = useQuery(proposalsQuery(projectId));
  if (error)
    return (
      <p role="alert" className="text-fail text-sm">
        {errorMessage(error)}
      </p>
    );
  if (!data) return <TableSkeleton label="Reading names" />;
  if (data.pins.nets.length === 0 && data.outOfScope.length === 0)
    return (
      <EmptyState
        title="No nets to give roles"
        actions={
          <LinkButton variant="primary" href={`/projects/${projectId}/nets/import` as Route}>
            Import a list
          </LinkButton>
        }
      >
        Roles, pairs and buses are read from nets. Import a section list or a net list first.
      </EmptyState>
    );
  return <Editor projectId={projectId} proposals={data} />;
}

function Editor({ projectId, proposals }: { projectId: string; proposals: DraftProposals }) {
  const router = useRouter();
  const client = useQueryClient();
  const first = useMemo(
    () => proposals.bindings.bindings.map(({ id: _id, ...rule }) => roleRow(rule)),
    [proposals],
  );
  const [rules, setRules] = useState(first);
  const { ticked, setTicked, confirmed } = useProposals(proposals);
  const pins = useMemo(() => pinsOf(proposals.pins), [proposals]);
  const settled = useDeferredValue(rules);
  const result = useMemo(() => assignRoles(pins, settled), [pins, settled]);
  const rulesChanged = rules !== first;
  const words = confirmedWords(confirmed);

  const confirm = useMutation({
    mutationFn: () =>
      confirmProposals(projectId, {
        ...confirmed,
        bindings: rulesChanged ? { version: proposals.bindings.version, bindings: rules.map(ruleOf) } : null,
      }),
    onSuccess: async ({ changed }) => {
      await Promise.all([
        client.invalidateQueries({ queryKey: netsKey(projectId) }),
        client.invalidateQueries({ queryKey: undoKey(projectId) }),
      ]);
      toast.success(`${changed.toLocaleString("en")} nets set${rulesChanged ? ", roles saved" : ""}`);
      router.push(`/projects/${projectId}/nets` as Route);
    },
    onError: (error) => toast.error(errorMessage(error)),
  });

  return (
    <div className="flex flex-col gap-8">
      <ImportSteps current="roles" />
      <section aria-labelledby="drive" className="flex flex-col gap-3">
        <h2 id="drive" className="text-lg font-semibold">
          Which pins drive
        </h2>
        <p className="text-ink-soft max-w-prose text-sm">
          The first rule that fits a pin decides; * stands for any run of characters, ? for one. A role that a
          list gave stands before every rule.
        </p>
        <DriverPicker pins={proposals.pins} rules={rules} onChange={setRules} />
        <RoleRules
          rows={rules}
          result={result}
          onChange={setRules}
          onAdd={() => setRules([...rules, roleRow({ role: "driver" })])}
        />
        <RoleCounts result={result} />
      </section>
      <ProposalTable
        id="out-of-scope"
        title="Out of scope"
        meaning="Ticked nets are left out of the check, with the reason shown. Those of which a name is no proof are not ticked."
        rows={proposals.outOfScope}
        columns={SCOPES}
        rowId={(row) => row.id}
        ticked={ticked.outOfScope}
        onTicked={setTicked("outOfScope")}
      />
      <ProposalTable
        id="pairs"
        title="Pairs"
        meaning="Ticked pairs are judged as one."
        rows={proposals.pairs}
        columns={PAIRS}
        rowId={(row) => row.positive.id}
        ticked={ticked.pairs}
        onTicked={setTicked("pairs")}
      />
      <ProposalTable
        id="buses"
        title="Buses"
        meaning="Nets of a bus are found and changed together."
        rows={proposals.buses}
        columns={BUSES}
        rowId={(row) => row.name}
        ticked={ticked.buses}
        onTicked={setTicked("buses")}
      />
      <ProposalTable
        id="match-groups"
        title="Match groups"
        meaning="Nets of a match group are to arrive together. Tick those that are."
        rows={proposals.matchGroups}
        columns={GROUPS}
        rowId={(row) => row.name}
        ticked={ticked.matchGroups}
        onTicked={setTicked("matchGroups")}
      />
      <div className="border-rule-line bg-paper sticky bottom-0 flex flex-wrap items-center gap-3 border-t py-3">
        <Button
          variant="primary"
          busy={confirm.isPending}
          disabled={words === "" && !rulesChanged}
          onClick={() => confirm.mutate()}
        >
          Confirm
        </Button>
        <LinkButton href={`/projects/${projectId}/nets` as Route}>Leave as it is</LinkButton>
        <p className="text-ink-soft text-sm" aria-live="polite">
          {[words, rulesChanged ? "roles of pins" : ""].filter(Boolean).join(", ") ||
            "Nothing is ticked or changed."}
        </p>
      </div>
    </div>
  );
}

function RoleCounts({ result }: { result: ReturnType<typeof assignRoles> }) {
  const { pins, nets } = result;
  const say = (count: number) => count.toLocaleString("en");
  return (
    <p className="max-w-prose text-sm" aria-live="polite">
      {say(pins.driver + pins.either)} pins can drive, {say(pins.receiver)} receive, {say(pins.open)} have no
      role yet.{" "}
      <span className={nets.noDriver > 0 ? "text-near" : undefined}>
        {say(nets.oneDriver)} nets have one driver, {say(nets.severalDrivers)} several, {say(nets.noDriver)}{" "}
        none.
      </span>
    </p>
  );
}
