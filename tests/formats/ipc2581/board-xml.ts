/** Hand-made IPC-2581 files of an invented board, built element by element. */

export interface XmlParts {
  revision?: string;
  units?: string;
  content?: string;
  header?: string;
  layers?: string;
  data?: string;
  step?: string;
  prolog?: string;
}

const LAYERS = `
<Layer name="TOP" layerFunction="CONDUCTOR" side="TOP" polarity="POSITIVE"/>
<Layer name="GND" layerFunction="PLANE" side="INTERNAL" polarity="POSITIVE"/>
<Layer name="IN2" layerFunction="SIGNAL" side="INTERNAL" polarity="POSITIVE"/>
<Layer name="BOTTOM" layerFunction="CONDUCTOR" side="BOTTOM" polarity="POSITIVE"/>
<Layer name="DRILL" layerFunction="DRILL" side="ALL" polarity="POSITIVE"><Span fromLayer="TOP" toLayer="BOTTOM"/></Layer>
<Layer name="INK" layerFunction="SILKSCREEN" side="TOP" polarity="POSITIVE"/>`;

const CONTENT = `
<StepRef name="tide gauge"/>
<DictionaryLineDesc units="MILLIMETER">
  <EntryLineDesc id="W150"><LineDesc lineEnd="ROUND" lineWidth="0.15"/></EntryLineDesc>
  <EntryLineDesc id="W200"><LineDesc lineEnd="ROUND" lineWidth="0.2"/></EntryLineDesc>
</DictionaryLineDesc>
<DictionaryStandard units="MILLIMETER">
  <EntryStandard id="ROUND5"><Circle diameter="0.5"/></EntryStandard>
  <EntryStandard id="BAR"><RectCenter width="1.0" height="0.4"/></EntryStandard>
</DictionaryStandard>`;

export function boardXml(parts: XmlParts = {}): string {
  return `<?xml version="1.0" encoding="UTF-8"?>${parts.prolog ?? ""}
<IPC-2581 revision="${parts.revision ?? "C"}" xmlns="http://webstds.ipc.org/2581">
<Content roleRef="Owner">${parts.content ?? CONTENT}</Content>
<Ecad name="tide gauge controller">
<CadHeader units="${parts.units ?? "MILLIMETER"}">${parts.header ?? ""}</CadHeader>
<CadData>${parts.layers ?? LAYERS}${parts.data ?? ""}
<Step name="tide gauge">${parts.step ?? ""}</Step>
</CadData></Ecad></IPC-2581>`;
}

export const feature = (layer: string, sets: string) =>
  `<LayerFeature layerRef="${layer}">${sets}</LayerFeature>`;

/** A line of a net through corners "x,y". */
export function line(net: string, corners: string[], width = "W150"): string {
  const [first = "0,0", ...rest] = corners;
  const at = (corner: string) => {
    const [x, y] = corner.split(",");
    return `x="${x}" y="${y}"`;
  };
  return `<Set net="${net}"><Features><Location x="0" y="0"/><Polyline><PolyBegin ${at(first)}/>${rest
    .map((corner) => `<PolyStepSegment ${at(corner)}/>`)
    .join("")}<LineDescRef id="${width}"/></Polyline></Features></Set>`;
}

export function pad(
  net: string,
  x: number,
  y: number,
  pin: string | null,
  shape = "ROUND5",
  xform = "",
): string {
  const [reference, name] = (pin ?? "").split(".");
  const pinRef = pin ? `<PinRef componentRef="${reference}" pin="${name}"/>` : "";
  return `<Set net="${net}"><Pad padstackDefRef="P">${xform}<Location x="${x}" y="${y}"/><StandardPrimitiveRef id="${shape}"/>${pinRef}</Pad></Set>`;
}

export function via(net: string, x: number, y: number): string {
  return `<Set net="${net}"><Hole name="h" diameter="0.3" platingStatus="VIA" plusTol="0" minusTol="0" x="${x}" y="${y}"/></Set>`;
}

export function stream(text: string | Uint8Array, chunk = 1024): ReadableStream<Uint8Array> {
  const bytes = typeof text === "string" ? new TextEncoder().encode(text) : text;
  let at = 0;
  return new ReadableStream({
    pull(controller) {
      if (at >= bytes.length) controller.close();
      else controller.enqueue(bytes.subarray(at, (at += chunk)));
    },
  });
}
