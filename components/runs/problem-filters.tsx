"use client";

import { type RefObject, useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Checkbox } from "@/components/ui/checkbox";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { NO_CLASS, rulesOf, type WorkedProblem } from "./problem-filter";
import { GROUPINGS } from "./problem-groups";
import { ruleTitle } from "./rule-title";
import { NO_FILTERS, type useProblemParams } from "./use-problem-params";

type Params = ReturnType<typeof useProblemParams>;

interface Props {
  problems: readonly WorkedProblem[];
  params: Params["params"];
  setParams: Params["setParams"];
  searchRef: RefObject<HTMLInputElement | null>;
}

const RARE = ["severity", "nominal", "waived", "flagged", "mine"] as const;

const plain = (values: readonly string[]) => values.map((value) => ({ value, label: value }));

/** What narrows the table and what groups it; each choice is in the address. */
export function ProblemFilters({ problems, params, setParams, searchRef }: Props) {
  const classes = useMemo(
    () => [...new Set(problems.map((problem) => problem.className ?? NO_CLASS))].sort(),
    [problems],
  );
  const rules = useMemo(
    () =>
      [...new Set(problems.flatMap(rulesOf))]
        .map((value) => ({ value, label: ruleTitle(value) }))
        .sort((a, b) => a.label.localeCompare(b.label)),
    [problems],
  );
  const narrowed = Object.keys(NO_FILTERS).some((name) => {
    const value = params[name as keyof typeof NO_FILTERS];
    return value !== null && value !== "" && value !== false;
  });
  // Filters that are set are seen, opened or not.
  const [opened, setOpened] = useState(false);
  const more = opened || RARE.some((name) => params[name] !== null && params[name] !== false);
  const choose = (name: keyof typeof NO_FILTERS) => (event: { target: { value: string } }) =>
    void setParams({ [name]: event.target.value || null });

  return (
    <div className="mb-3 flex flex-wrap items-end gap-x-3 gap-y-2 print:hidden">
      <Input
        ref={searchRef}
        label="Search"
        type="search"
        placeholder="path, class, pin, layer"
        fieldClassName="w-52"
        value={params.q}
        onChange={(event) => void setParams({ q: event.target.value || null })}
        onKeyDown={(event) => {
          if (event.key === "Escape" || event.key === "Enter") event.currentTarget.blur();
        }}
      />
      <Select
        label="Group by"
        fieldClassName="w-32"
        options={plain(GROUPINGS)}
        value={params.group}
        onChange={(event) =>
          void setParams({ group: GROUPINGS.find((name) => name === event.target.value) ?? null, in: null })
        }
      />
      <Select
        label="Verdict"
        placeholder="any"
        fieldClassName="w-24"
        options={plain(["fail", "near", "no data"])}
        value={params.verdict ?? ""}
        onChange={choose("verdict")}
      />
      <Select
        label="Class"
        placeholder="any"
        fieldClassName="w-32"
        options={plain(classes)}
        value={params.class ?? ""}
        onChange={choose("class")}
      />
      <Select
        label="Rule"
        placeholder="any"
        fieldClassName="w-36"
        options={rules}
        value={params.rule ?? ""}
        onChange={choose("rule")}
      />
      {more ? (
        <>
          <Select
            label="Severity"
            placeholder="any"
            fieldClassName="w-24"
            options={plain(["error", "warning", "info"])}
            value={params.severity ?? ""}
            onChange={choose("severity")}
          />
          <Select
            label="Fails"
            placeholder="anywhere"
            fieldClassName="w-32"
            options={[
              { value: "nominal", label: "at nominal" },
              { value: "corner", label: "corner only" },
            ]}
            value={params.nominal ?? ""}
            onChange={choose("nominal")}
          />
          <Select
            label="Excused"
            placeholder="either"
            fieldClassName="w-24"
            options={plain(["yes", "no"])}
            value={params.waived ?? ""}
            onChange={choose("waived")}
          />
          <Select
            label="Flagged"
            placeholder="either"
            fieldClassName="w-24"
            options={plain(["yes", "no"])}
            value={params.flagged ?? ""}
            onChange={choose("flagged")}
          />
          <div className="flex h-8 items-center">
            <Checkbox
              label="Assigned to me"
              checked={params.mine}
              onCheckedChange={(mine) => void setParams({ mine: mine || null })}
            />
          </div>
        </>
      ) : (
        <Button variant="quiet" onClick={() => setOpened(true)}>
          More filters
        </Button>
      )}
      {narrowed ? (
        <Button variant="quiet" onClick={() => void setParams(NO_FILTERS)}>
          Show all
        </Button>
      ) : null}
    </div>
  );
}
