"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/select";
import { dielectricFamilies, findGlassStyle, plyOfFamily } from "@/lib/si/materials";
import { fromSi } from "@/lib/si/units";
import type { MaterialTexts } from "./material-form";

const WOVEN = dielectricFamilies.filter(({ base }) => base !== null);

interface Props {
  glassStyle: string;
  resinPercent: string;
  /** A prepreg's thickness follows from its fabric and resin; a laminate's is chosen. */
  prepreg: boolean;
  onFill: (texts: Partial<MaterialTexts>) => void;
}

/** Dk, Df and ply thickness from a resin family, a glass style and a resin content, by the mixing rule. */
export function PlyFiller({ glassStyle, resinPercent, prepreg, onFill }: Props) {
  const [familyId, setFamilyId] = useState("glass-epoxy");
  const [said, setSaid] = useState<{ text: string; refused: boolean } | null>(null);

  function fill() {
    const family = WOVEN.find(({ id }) => id === familyId);
    const style = findGlassStyle(glassStyle);
    if (!family) return;
    if (!style)
      return setSaid({
        text: `'${glassStyle}' is no glass style of the library. Choose one such as 2116.`,
        refused: true,
      });
    const resin = resinPercent.replace("%", "").replace(",", ".").trim() || style.resinPercent;
    try {
      const ply = plyOfFamily(family, style, Number(resin));
      onFill({
        resinPercent: resin,
        dk: ply.dk.toFixed(2),
        df: ply.df.toFixed(4),
        frequency: `${fromSi(family.frequency, "GHz").value} GHz`,
        ...(prepreg ? { thickness: `${(ply.thickness * 1e6).toFixed(0)} µm` } : {}),
        source: `computed: ${family.name}, ${style.style} with ${resin} % resin, logarithmic mixing rule (Lichtenecker 1926)`,
        origin: "assumed",
      });
      setSaid({ text: `Filled in from ${style.style} with ${resin} % resin.`, refused: false });
    } catch (error) {
      setSaid({ text: error instanceof Error ? error.message : "This gave no values.", refused: true });
    }
  }

  return (
    <fieldset className="border-rule-line flex flex-col gap-2 rounded border px-3 pt-1 pb-3">
      <legend className="text-ink-soft px-1 text-xs">No data sheet? Compute from glass and resin</legend>
      <div className="flex flex-wrap items-end gap-2">
        <Select
          label="Resin of"
          fieldClassName="min-w-0 flex-1 basis-48"
          options={WOVEN.map(({ id, name }) => ({ value: id, label: name }))}
          value={familyId}
          onChange={(event) => setFamilyId(event.target.value)}
        />
        <Button onClick={fill}>Compute Dk and Df</Button>
      </div>
      <p role="status" className={`min-h-4 text-xs ${said?.refused ? "text-fail" : "text-ink-soft"}`}>
        {said?.text ?? "Takes the glass style above, and its usual resin content where none is given."}
      </p>
    </fieldset>
  );
}
