"use client";

import { netClassDoc, type NetClassDoc } from "@/lib/schemas/net-class";
import { KIND_OPTIONS, SIGNAL_OPTIONS } from "./class-words";
import { useClassesDesk } from "./classes-desk";
import { Choice, LineText, PercentText, QuantityText } from "./doc-fields";
import { checked } from "./field-words";
import { driverOptions, receiverOptions } from "./model-options";

interface Props {
  doc: NetClassDoc;
  onChange: (change: Partial<NetClassDoc>) => void;
}

const { shape } = netClassDoc;

/** What a class says apart from its layers, its termination and its limits. */
export function ClassFields({ doc, onChange }: Props) {
  const { models } = useClassesDesk();
  const clock = doc.signal === "clock";
  return (
    <div className="grid grid-cols-2 gap-x-4 gap-y-3">
      <LineText
        className="col-span-2"
        address="name"
        label="Name"
        value={doc.name}
        read={(text) => checked(shape.name, text)}
        onChange={(name) => onChange({ name })}
      />
      <Choice
        label="Kind"
        options={KIND_OPTIONS}
        value={doc.kind}
        onChange={(chosen) => onChange({ kind: chosen === "differential" ? "differential" : "single" })}
      />
      <Choice
        label="Signal"
        options={SIGNAL_OPTIONS}
        value={doc.signal}
        onChange={(chosen) => onChange({ signal: checked(shape.signal, chosen) })}
      />
      <QuantityText
        address="target"
        label={doc.kind === "differential" ? "Target impedance, differential" : "Target impedance"}
        dimension="resistance"
        unit="Ω"
        value={doc.targetImpedance}
        schema={shape.targetImpedance}
        onChange={(targetImpedance) => onChange({ targetImpedance })}
      />
      <PercentText
        address="tolerance"
        label="Tolerance ±"
        value={doc.tolerancePercent}
        schema={shape.tolerancePercent}
        onChange={(tolerancePercent) => onChange({ tolerancePercent })}
      />
      <Choice
        label="Driver model"
        placeholder="As bound to the pin"
        options={driverOptions(models)}
        value={doc.driverModelLineageId ?? ""}
        onChange={(chosen) => onChange({ driverModelLineageId: chosen || null })}
      />
      <Choice
        label="Receiver model"
        placeholder="As bound to the pin"
        options={receiverOptions(models)}
        value={doc.receiverModelLineageId ?? ""}
        onChange={(chosen) => onChange({ receiverModelLineageId: chosen || null })}
      />
      <QuantityText
        address="edge"
        label="Edge, 10–90 %"
        hint="Empty: the driver model’s. A model bound to the pin keeps its own."
        dimension="time"
        unit="ns"
        value={doc.edge}
        schema={shape.edge}
        onChange={(edge) => onChange({ edge })}
      />
      <QuantityText
        address="rate"
        label={clock ? "Clock frequency" : "Bit rate"}
        hint={clock ? undefined : "A bare first number is Mb/s. Empty: there is no bit time."}
        dimension="frequency"
        unit={clock ? "MHz" : "Mb/s"}
        value={doc.rate}
        schema={shape.rate}
        onChange={(rate) => onChange({ rate })}
      />
      <QuantityText
        address="spacing"
        label="Spacing to other nets, least"
        dimension="length"
        value={doc.spacing}
        schema={shape.spacing}
        onChange={(spacing) => onChange({ spacing })}
      />
      <QuantityText
        address="flightTimeMax"
        label="Flight time, most"
        dimension="time"
        unit="ns"
        value={doc.flightTimeMax}
        schema={shape.flightTimeMax}
        onChange={(flightTimeMax) => onChange({ flightTimeMax })}
      />
      <LineText
        className="col-span-2"
        address="netPatterns"
        label="Net names"
        hint="Patterns that put a net into this class at import, with commas between: CLK*, SD_DQ?"
        value={doc.netPatterns.join(", ")}
        read={(text) => checked(shape.netPatterns, patternsOf(text)).join(", ")}
        onChange={(text) => onChange({ netPatterns: patternsOf(text) })}
      />
    </div>
  );
}

function patternsOf(text: string): string[] {
  return [...new Set(text.split(/[,;\s]+/).filter((pattern) => pattern !== ""))];
}
