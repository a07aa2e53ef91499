"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useId, useMemo, useState } from "react";
import { useForm, useWatch } from "react-hook-form";
import { useLengthUnit } from "@/components/shell/length-unit";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input, TextArea } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { ApiError, errorMessage } from "@/lib/client/api";
import { createMaterial, putMaterial } from "@/lib/client/materials";
import { origins } from "@/lib/schemas/common";
import { type MaterialDoc, materialKinds, type StoredMaterial } from "@/lib/schemas/material";
import { copperFoils, glassStyles } from "@/lib/si/materials";
import {
  fieldsOfKind,
  fieldWords,
  type MaterialField,
  materialForm,
  type MaterialTexts,
  textsOf,
} from "./material-form";
import { PlyFiller } from "./ply-filler";

/** What the dialog begins with: an entry to edit, or a form that makes a new one. */
export interface MaterialStart {
  editing: StoredMaterial | null;
  from: Parameters<typeof textsOf>[0];
}

interface Props {
  start: MaterialStart;
  onClose: () => void;
  onSaved: (saved: StoredMaterial, made: boolean) => void;
}

const THICKNESS: Record<MaterialDoc["kind"], string> = {
  laminate: "Thickness (may stay empty)",
  prepreg: "Thickness of a ply",
  foil: "Base thickness or weight",
  mask: "Thickness over laminate",
};

/** Makes or edits an entry of the team's own. */
export function MaterialDialog({ start, onClose, onSaved }: Props) {
  const { unit } = useLengthUnit();
  const { editing } = start;
  const lists = useId();
  const resolver = useMemo(() => zodResolver(materialForm(unit)), [unit]);
  const { register, handleSubmit, setError, setValue, reset, control, formState } = useForm<
    MaterialTexts,
    unknown,
    MaterialDoc
  >({ resolver, defaultValues: textsOf(start.from) });
  const { errors, isSubmitting } = formState;
  const [kind, glassStyle, resinPercent] = useWatch({
    control,
    name: ["kind", "glassStyle", "resinPercent"],
  });
  const [version, setVersion] = useState(editing?.version ?? 0);
  const [conflict, setConflict] = useState<StoredMaterial | null>(null);
  const has = fieldsOfKind[kind];

  const submit = handleSubmit(async (doc) => {
    try {
      const saved = editing ? await putMaterial(editing.id, version, doc) : await createMaterial(doc);
      onSaved(saved, editing === null);
    } catch (error) {
      if (!(error instanceof ApiError)) return setError("root", { message: errorMessage(error) });
      let placed = false;
      for (const [path, message] of Object.entries(error.fields)) {
        const field = path.replace(/^material\./, "");
        if (!(field in fieldWords)) continue;
        setError(field as MaterialField, { message }, { shouldFocus: !placed });
        placed = true;
      }
      if (error.isConflict) {
        const current = error.current as StoredMaterial;
        setConflict(current);
        setVersion(current.version);
        const words = error.changed.map((field) => fieldWords[field] ?? field).join(", ");
        setError("root", { message: `${error.message}${words ? ` It differs in ${words}.` : ""}` });
      } else if (!placed) setError("root", { message: errorMessage(error) });
    }
  });

  const text = (field: MaterialField, label: string, hint?: string, list?: string) => (
    <Input
      label={label}
      hint={hint}
      list={list}
      autoComplete="off"
      spellCheck={false}
      error={errors[field]?.message}
      {...register(field)}
    />
  );

  return (
    <Dialog
      open
      wide
      onOpenChange={onClose}
      title={editing ? `Edit ${editing.name}` : "Add a material"}
      description={`For every project of the team. Stackups that were filled in from it keep the values they have.${
        editing?.createdByName ? ` Added by ${editing.createdByName}.` : ""
      }`}
    >
      <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
        <div className="grid gap-x-4 gap-y-3 sm:grid-cols-3">
          <Input
            label="Name"
            fieldClassName="sm:col-span-2"
            autoComplete="off"
            error={errors.name?.message}
            {...register("name")}
          />
          <Select
            label="Kind"
            options={materialKinds.map((value) => ({ value, label: value }))}
            error={errors.kind?.message}
            {...register("kind")}
          />
          {has.has("glassStyle")
            ? text("glassStyle", "Glass style", "IPC-4412 number", `${lists}styles`)
            : null}
          {has.has("resinPercent") ? text("resinPercent", "Resin content", "% by weight") : null}
          {has.has("dk") ? text("dk", "Dk") : null}
          {has.has("df") ? text("df", "Df (may stay empty)") : null}
          {has.has("frequency") ? text("frequency", "Dk and Df at") : null}
          {text(
            "thickness",
            THICKNESS[kind],
            kind === "prepreg"
              ? "Pressed, without copper to fill"
              : kind === "foil"
                ? "1/2 oz or 18 µm"
                : undefined,
            kind === "foil" ? `${lists}foils` : undefined,
          )}
          {has.has("roughness") ? text("roughness", "Roughness", "rms of the bonded side, µm") : null}
        </div>
        {has.has("glassStyle") ? (
          <PlyFiller
            glassStyle={glassStyle}
            resinPercent={resinPercent}
            prepreg={kind === "prepreg"}
            onFill={(texts) => {
              for (const [field, value] of Object.entries(texts))
                setValue(field as MaterialField, value, { shouldDirty: true });
            }}
          />
        ) : null}
        <div className="grid gap-x-4 gap-y-3 sm:grid-cols-3">
          <TextArea
            label="Source of these values"
            hint="Data sheet and its date, measurement, publication; or “common practice, no source”, “from memory”."
            rows={2}
            fieldClassName="sm:col-span-2"
            error={errors.source?.message}
            {...register("source")}
          />
          <Select
            label="Origin"
            options={origins.map((value) => ({ value, label: value }))}
            error={errors.origin?.message}
            {...register("origin")}
          />
        </div>
        <datalist id={`${lists}styles`}>
          {glassStyles.map(({ style }) => (
            <option key={style} value={style} />
          ))}
        </datalist>
        <datalist id={`${lists}foils`}>
          {copperFoils.map(({ name }) => (
            <option key={name} value={name} />
          ))}
        </datalist>
        {errors.root ? (
          <p role="alert" className="text-fail text-sm">
            {errors.root.message}
          </p>
        ) : null}
        <div className="flex flex-wrap justify-end gap-2">
          <Button onClick={onClose}>Cancel</Button>
          {conflict ? (
            <Button
              onClick={() => {
                reset(textsOf(conflict));
                setConflict(null);
              }}
            >
              Take the present one
            </Button>
          ) : null}
          <Button type="submit" variant="primary" busy={isSubmitting}>
            {conflict ? "Save mine over it" : editing ? "Save" : "Add"}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
