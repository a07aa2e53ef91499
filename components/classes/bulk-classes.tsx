"use client";

import { useForm, useWatch } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { NetClassRow } from "@/lib/client/net-classes";
import { netClassDoc, type NetClassDoc } from "@/lib/schemas/net-class";
import { counted, SCHEME_OPTIONS } from "./class-words";
import { useClassesDesk } from "./classes-desk";
import { readPercent, readQuantity } from "./field-words";
import { driverOptions, receiverOptions } from "./model-options";
import { emptyTermination, type Scheme, suggestTermination } from "./suggest-termination";

interface Props {
  rows: readonly NetClassRow[];
  busy: boolean;
  onApply: (changes: { row: NetClassRow; change: Partial<NetClassDoc> }[]) => void;
  onClear: () => void;
}

interface Fields {
  tolerance: string;
  driver: string;
  receiver: string;
  edge: string;
  scheme: Scheme | "";
  resistor: string;
}

const KEEP: Fields = { tolerance: "", driver: "", receiver: "", edge: "", scheme: "", resistor: "" };
const NONE = "none";

/** The same change to all ticked classes; what is left empty stays as it is in each. */
export function BulkClasses({ rows, busy, onApply, onClear }: Props) {
  const { models } = useClassesDesk();
  const { register, handleSubmit, setError, control, formState } = useForm<Fields>({ defaultValues: KEEP });
  const scheme = useWatch({ control, name: "scheme" });

  function apply(fields: Fields) {
    const change: Partial<NetClassDoc> = {};
    let resistance: NetClassDoc["edge"] = null;
    const read = (name: keyof Fields, act: () => void): boolean => {
      try {
        act();
        return true;
      } catch (reason) {
        setError(name, { message: reason instanceof Error ? reason.message : "This cannot be read." });
        return false;
      }
    };
    const fine = [
      read("tolerance", () => {
        const text = readPercent(fields.tolerance, netClassDoc.shape.tolerancePercent);
        if (text !== "") change.tolerancePercent = text;
      }),
      read("edge", () => {
        const edge = readQuantity(fields.edge, "time", "ns", netClassDoc.shape.edge);
        if (edge) change.edge = edge;
      }),
      read("resistor", () => {
        resistance = readQuantity(fields.resistor, "resistance", "Ω");
      }),
    ].every(Boolean);
    if (!fine) return;
    if (fields.driver !== "") change.driverModelLineageId = fields.driver === NONE ? null : fields.driver;
    if (fields.receiver !== "")
      change.receiverModelLineageId = fields.receiver === NONE ? null : fields.receiver;
    const chosen = fields.scheme;
    onApply(
      rows.map((row) => {
        if (chosen === "") return { row, change };
        const after = { ...row, ...change };
        const suggested = suggestTermination(chosen, after, models)?.values ?? {};
        const values = resistance
          ? { resistance, ...(chosen === "thevenin" ? { resistanceLow: resistance } : {}) }
          : suggested;
        const termination =
          chosen === "none" ? emptyTermination : { ...emptyTermination, scheme: chosen, ...values };
        return { row, change: { ...change, termination } };
      }),
    );
  }

  const { errors } = formState;
  return (
    <form
      aria-label="Change the ticked classes"
      className="border-copper bg-sheet mb-3 flex flex-wrap items-start gap-3 border-l-2 px-3 py-2"
      onSubmit={(event) => void handleSubmit(apply)(event)}
    >
      <p className="w-full text-sm font-medium" aria-live="polite">
        {counted(rows.length, "class", "classes")} ticked. What is left empty stays as it is.
      </p>
      <Input
        label="Tolerance"
        fieldClassName="w-28"
        placeholder="Keep"
        error={errors.tolerance?.message}
        {...register("tolerance")}
      />
      <Select
        label="Driver model"
        fieldClassName="w-44"
        placeholder="Keep"
        options={[...driverOptions(models), { value: NONE, label: "None: as bound" }]}
        {...register("driver")}
      />
      <Select
        label="Receiver model"
        fieldClassName="w-44"
        placeholder="Keep"
        options={[...receiverOptions(models), { value: NONE, label: "None: as bound" }]}
        {...register("receiver")}
      />
      <Input
        label="Edge 10–90 %"
        fieldClassName="w-28"
        placeholder="Keep"
        error={errors.edge?.message}
        {...register("edge")}
      />
      <Select
        label="Termination"
        fieldClassName="w-44"
        placeholder="Keep"
        options={SCHEME_OPTIONS}
        {...register("scheme")}
      />
      {scheme !== "" && scheme !== "none" ? (
        <Input
          label="Resistor"
          fieldClassName="w-44"
          placeholder="Each its suggestion"
          hint="Empty: the nearest E24 value for each class."
          error={errors.resistor?.message}
          {...register("resistor")}
        />
      ) : null}
      <div className="flex w-full gap-2">
        <Button type="submit" variant="primary" busy={busy} disabled={!formState.isDirty}>
          Change {counted(rows.length, "class", "classes")}
        </Button>
        <Button variant="quiet" onClick={onClear}>
          Untick all
        </Button>
      </div>
    </form>
  );
}
