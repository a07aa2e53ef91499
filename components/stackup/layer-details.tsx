"use client";

import { Select } from "@/components/ui/select";
import { type Origin, origins } from "@/lib/schemas/common";
import type { StackupLayerDoc } from "@/lib/schemas/stackup";
import { builtThicknessExact, isCopper } from "@/lib/si/stackup";
import { copperFoils, dielectricFamilies } from "@/lib/si/materials";
import { type EditLayer, documentOf } from "./edit-layer";
import { columnLength } from "./layer-field-text";
import { LayerText } from "./layer-text";
import { MaterialMenu } from "./material-menu";
import { PliesEditor } from "./plies-editor";
import { useStackupFields } from "./stackup-fields";
import { useStackupUnits } from "./stackup-units";
import type { StackupEditor } from "./use-stackup-editor";

const FOILS = copperFoils.map(({ name }) => name);
const FAMILIES = dielectricFamilies.map(({ name }) => name);

/** Every field of the chosen layer: those that its kind has. */
export function LayerDetails({ editor, layer }: { editor: StackupEditor; layer: EditLayer }) {
  const { readOnly } = useStackupFields();
  const change = editor.changeLayer;
  const place = editor.stackup.layers.indexOf(layer) + 1;
  return (
    <section aria-label={`Layer ${layer.name}`} className="border-rule-line border-t pt-3">
      <div className="mb-3 flex flex-wrap items-center justify-between gap-2">
        <h2 className="text-base font-semibold">
          {layer.name || `Layer ${place}`}
          <span className="text-ink-soft ml-2 text-sm font-normal">
            {layer.kind}, layer {place} of {editor.stackup.layers.length}
          </span>
        </h2>
        {readOnly ? null : <MaterialMenu layer={layer} onPick={(values) => change(layer.key, values)} />}
      </div>
      <div className="grid grid-cols-2 gap-x-4 gap-y-3 sm:grid-cols-3">
        {isCopper(layer) ? (
          <CopperFields editor={editor} layer={layer} onChange={change} />
        ) : (
          <DielectricFields editor={editor} layer={layer} onChange={change} />
        )}
        {readOnly ? (
          <div className="flex flex-col gap-1 text-sm">
            <span className="font-medium">Origin</span>
            <span className="text-ink-soft">{layer.origin}</span>
          </div>
        ) : (
          <Select
            label="Origin of these values"
            value={layer.origin}
            options={origins.map((value) => ({ value, label: value }))}
            onChange={(event) => change(layer.key, { origin: event.target.value as Origin })}
          />
        )}
        <div className="col-span-2">
          <LayerText
            layer={layer}
            onChange={change}
            field="sourceNote"
            label="Source note"
            placeholder="where these values come from"
          />
        </div>
      </div>
    </section>
  );
}

interface PartProps {
  editor: StackupEditor;
  layer: EditLayer;
  onChange: (key: string, change: Partial<StackupLayerDoc>) => void;
}

function CopperFields({ editor, layer, onChange }: PartProps) {
  const common = { layer, onChange };
  return (
    <>
      <LayerText {...common} field="material" label="Material" suggestions={["Copper", "Copper, rolled"]} />
      <LayerText {...common} field="baseFoil" label="Base foil" suggestions={FOILS} placeholder="1/2 oz" />
      <LayerText
        {...common}
        field="plating"
        label="Plating"
        placeholder="none"
        hint={<Finished editor={editor} layer={layer} />}
      />
      <LayerText
        {...common}
        field="coveragePercent"
        label="Copper coverage"
        hint="Share of the area that is copper"
      />
      <LayerText {...common} field="etch" label="Etch" small hint="Foot width less crown width" />
      <LayerText
        {...common}
        field="roughness"
        label="Roughness"
        small
        placeholder="not given"
        hint="rms, bonded side"
      />
      {layer.kind === "plane" ? (
        <LayerText {...common} field="planeNet" label="Net of the plane" placeholder="GND" />
      ) : null}
    </>
  );
}

function DielectricFields({ editor, layer, onChange }: PartProps) {
  const { readOnly } = useStackupFields();
  const common = { layer, onChange };
  const pressed = layer.kind === "prepreg" && layer.thicknessMode === "pressed";
  return (
    <>
      <LayerText {...common} field="material" label="Material" suggestions={FAMILIES} />
      {layer.kind === "prepreg" && !readOnly ? (
        <Select
          label="Thickness is"
          value={layer.thicknessMode}
          options={[
            { value: "typed", label: "typed, after pressing" },
            { value: "pressed", label: "pressed from plies" },
          ]}
          onChange={(event) =>
            onChange(layer.key, { thicknessMode: event.target.value === "pressed" ? "pressed" : "typed" })
          }
        />
      ) : null}
      {pressed ? (
        <div className="flex flex-col gap-1 text-sm">
          <span className="font-medium">Pressed thickness</span>
          <Finished editor={editor} layer={layer} />
        </div>
      ) : (
        <LayerText
          {...common}
          field="thickness"
          label={layer.kind === "mask" ? "Thickness over laminate" : "Thickness"}
        />
      )}
      {layer.kind === "mask" ? (
        <LayerText
          {...common}
          field="maskOverTrace"
          label="Thickness over a trace"
          placeholder="as over laminate"
        />
      ) : (
        <LayerText {...common} field="tolerancePercent" label="Tolerance ±" placeholder="not given" />
      )}
      <LayerText {...common} field="dk" label="Dk" />
      <LayerText {...common} field="df" label="Df" placeholder="not given" />
      <LayerText {...common} field="dkFrequency" label="Dk and Df at" placeholder="1 GHz" />
      {layer.kind === "prepreg" && (pressed || layer.plies.length > 0) ? (
        <div className="col-span-full">
          <PliesEditor layer={layer} onChange={onChange} idle={!pressed} />
        </div>
      ) : null}
    </>
  );
}

/** The thickness as built, exact. */
function Finished({ editor, layer }: { editor: StackupEditor; layer: EditLayer }) {
  const { reader } = useStackupUnits();
  const { layers } = documentOf(editor.stackup);
  const built = builtThicknessExact(layers, editor.stackup.layers.indexOf(layer), reader);
  if (!built)
    return (
      <span>
        {layer.kind === "prepreg"
          ? "No data: it needs plies, and foil and coverage of the copper it fills."
          : "No data"}
      </span>
    );
  const { text } = columnLength(built, reader);
  return (
    <span>
      {isCopper(layer) ? "Finished " : ""}
      {text} {reader}
    </span>
  );
}
