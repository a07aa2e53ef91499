"use client";

import { Plus, X } from "lucide-react";
import { Button } from "@/components/ui/button";
import { ply as plySchema, type StackupLayerDoc } from "@/lib/schemas/stackup";
import { findGlassStyle, glassStyles } from "@/lib/si/materials";
import { parseQuantity } from "@/lib/si/units";
import type { EditLayer } from "./edit-layer";
import { shownLength } from "./layer-field-text";
import { FieldText, useStackupFields } from "./stackup-fields";
import { useStackupUnits } from "./stackup-units";

type Ply = StackupLayerDoc["plies"][number];

const STYLES = glassStyles.map(({ style }) => style);

interface Props {
  layer: EditLayer;
  onChange: (key: string, change: Partial<StackupLayerDoc>) => void;
  /** True where the thickness is typed, so that the plies only describe. */
  idle: boolean;
}

/** The plies of a prepreg opening. A known glass style fills in its resin and thickness. */
export function PliesEditor({ layer, onChange, idle }: Props) {
  const { readOnly, accept } = useStackupFields();
  const { reader } = useStackupUnits();
  const put = (plies: Ply[]) => onChange(layer.key, { plies });
  const change = (index: number, part: Partial<Ply>) =>
    put(layer.plies.map((present, at) => (at === index ? { ...present, ...part } : present)));

  return (
    <div>
      <p className="text-sm font-medium">
        Plies
        {idle ? (
          <span className="text-ink-soft font-normal"> (not used while the thickness is typed)</span>
        ) : null}
      </p>
      <ul className="mt-1 flex flex-col gap-1">
        {layer.plies.map((present, index) => (
          <li key={index} className="grid grid-cols-[56px_1fr_1fr_1.3fr_32px] items-start gap-2">
            <FieldText
              label={`Count of ply ${index + 1}`}
              labelHidden
              address={`${layer.key}.plies.${index}.count`}
              typed={String(present.count)}
              shown={`${present.count} ×`}
              commit={(text) => change(index, { count: readCount(text) })}
            />
            <FieldText
              label={`Glass style of ply ${index + 1}`}
              labelHidden
              address={`${layer.key}.plies.${index}.style`}
              typed={present.style}
              shown={present.style}
              placeholder="style"
              suggestions={STYLES}
              commit={(text) => change(index, styleValues(text))}
            />
            <FieldText
              label={`Resin of ply ${index + 1}`}
              labelHidden
              address={`${layer.key}.plies.${index}.resin`}
              typed={present.resinPercent ?? ""}
              shown={present.resinPercent ? `${present.resinPercent} %` : ""}
              placeholder="resin %"
              commit={(text) => change(index, { resinPercent: readResin(text) })}
            />
            <FieldText
              label={`Thickness of ply ${index + 1}`}
              labelHidden
              address={`${layer.key}.plies.${index}.thickness`}
              typed={shownLength(present.thickness, reader)}
              shown={shownLength(present.thickness, reader)}
              commit={(text) =>
                change(index, { thickness: check("thickness", parseQuantity(text, "length", reader)) })
              }
            />
            {readOnly ? null : (
              <Button
                variant="quiet"
                size="icon"
                aria-label={`Remove ply ${index + 1}`}
                onClick={() => {
                  // Addresses go by place: a refused text must not land on the ply that moves up.
                  layer.plies.forEach((_, at) =>
                    ["count", "style", "resin", "thickness"].forEach((part) =>
                      accept(`${layer.key}.plies.${at}.${part}`),
                    ),
                  );
                  put(layer.plies.filter((_, at) => at !== index));
                }}
              >
                <X size={14} aria-hidden="true" />
              </Button>
            )}
          </li>
        ))}
      </ul>
      {readOnly || layer.plies.length >= 12 ? null : (
        <Button className="mt-2" onClick={() => put([...layer.plies, firstPly(layer.plies.at(-1))])}>
          <Plus size={14} aria-hidden="true" />
          Add a ply
        </Button>
      )}
    </div>
  );
}

function firstPly(like: Ply | undefined): Ply {
  return like
    ? { ...like, count: 1 }
    : {
        style: "",
        resinPercent: null,
        thickness: { value: "100", unit: "µm" },
        count: 1,
        ...styleValues("2116"),
      };
}

function styleValues(text: string): Partial<Ply> {
  const style = check("style", text.trim());
  const known = findGlassStyle(style);
  return known ? { style, resinPercent: known.resinPercent, thickness: known.thickness } : { style };
}

function readCount(text: string): number {
  const written = text.replace(/[×x]/giu, "").trim();
  if (!/^\d+$/.test(written)) throw new Error(`'${text}' is not a count. Write a whole number from 1 to 12.`);
  return check("count", Number(written));
}

function readResin(text: string): string | null {
  const written = text.replace("%", "").replace(",", ".").trim();
  return check("resinPercent", written === "" ? null : written);
}

function check<Field extends keyof typeof plySchema.shape>(field: Field, value: unknown): Ply[Field] {
  const parsed = plySchema.shape[field].safeParse(value);
  if (!parsed.success) throw new Error(parsed.error.issues[0]?.message ?? "This is not a value for a ply.");
  return parsed.data as Ply[Field];
}
