"use client";

import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { scopeKinds } from "@/lib/schemas/net";
import type { NetFilter } from "./filter-nets";
import { KIND_WORDS, SCOPE_WORDS } from "./net-words";

interface Props {
  filter: NetFilter;
  onChange: (change: Partial<NetFilter>) => void;
  classes: readonly { lineageId: string; name: string }[];
  layers: readonly string[];
}

const NO_FILTER: NetFilter = { q: "", class: "", scope: "", kind: "", layer: "", member: "" };

/** What the table of nets shows; every choice is in the address. */
export function NetFilters({ filter, onChange, classes, layers }: Props) {
  const narrowed = Object.values(filter).some((value) => value !== "");
  const pick = (field: keyof NetFilter) => ({
    value: filter[field],
    onChange: (event: { target: { value: string } }) => onChange({ [field]: event.target.value }),
  });
  return (
    <div role="search" aria-label="Nets" className="flex flex-wrap items-end gap-3 print:hidden">
      <Input
        label="Search"
        type="search"
        placeholder="name, bus or group"
        fieldClassName="w-full sm:w-56"
        {...pick("q")}
      />
      <Select
        label="Class"
        fieldClassName="w-[calc(50%-0.375rem)] sm:w-40"
        placeholder="All classes"
        options={[
          ...classes.map(({ lineageId, name }) => ({ value: lineageId, label: name })),
          { value: "none", label: "In no class" },
        ]}
        {...pick("class")}
      />
      <Select
        label="Scope"
        fieldClassName="w-[calc(50%-0.375rem)] sm:w-40"
        placeholder="All scopes"
        options={Object.entries(SCOPE_WORDS).map(([value, label]) => ({ value, label }))}
        {...pick("scope")}
      />
      <Select
        label="Kind"
        fieldClassName="w-[calc(50%-0.375rem)] sm:w-32"
        placeholder="All kinds"
        options={scopeKinds.map((value) => ({ value, label: KIND_WORDS[value] ?? value }))}
        {...pick("kind")}
      />
      <Select
        label="Layer"
        fieldClassName="w-[calc(50%-0.375rem)] sm:w-40"
        placeholder="All layers"
        options={layers.map((value) => ({ value, label: value }))}
        {...pick("layer")}
      />
      <Select
        label="Belongs to"
        fieldClassName="w-[calc(50%-0.375rem)] sm:w-36"
        placeholder="Anything"
        options={[
          { value: "pair", label: "A pair" },
          { value: "bus", label: "A bus" },
          { value: "group", label: "A match group" },
        ]}
        {...pick("member")}
      />
      {narrowed ? (
        <Button variant="quiet" onClick={() => onChange(NO_FILTER)}>
          Show all
        </Button>
      ) : null}
    </div>
  );
}
