import "server-only";
import { writeDelimited } from "@/lib/formats/delimited/write";
import type { ImpedanceNote } from "@/lib/schemas/release";

/** The impedance-control note as a spreadsheet reads it: lines first, then the stackup. */
export function noteCsv(note: ImpedanceNote): string {
  return writeDelimited([
    ["board", note.project],
    ["revision", note.revision],
    ["title", note.title],
    ["team", note.team],
    ["signed by", note.signedBy],
    ["released", new Date(note.releasedAt).toISOString()],
    ["total thickness [mm]", millimetres(note.totalThickness_m)],
    ...(note.remarks ? [["remarks", note.remarks]] : []),
    [],
    [
      "line",
      "layer",
      "structure",
      "classes",
      "finished foot width",
      "width unit",
      "gap",
      "gap unit",
      "target [ohm]",
      "tolerance [%]",
      "predicted [ohm]",
      "method",
      "by formula [ohm]",
      "formula",
      "spread 0.5 % [ohm]",
      "spread 99.5 % [ohm]",
      "predicted yield [%]",
      "spread by",
      "reference planes",
      "routed nets",
    ],
    ...note.lines.map((line) => [
      line.line,
      line.layer,
      line.kind === "single" ? "single-ended" : "differential pair",
      line.className.join("; "),
      line.width.value,
      line.width.unit,
      line.gap?.value ?? "",
      line.gap?.unit ?? "",
      line.targetOhms,
      line.tolerancePercent,
      line.predictedOhms === null ? "no data" : line.predictedOhms.toFixed(1),
      line.method,
      line.closedForm?.ohms.toFixed(1) ?? "",
      line.closedForm
        ? `${line.closedForm.title}${line.closedForm.inRange ? "" : " (outside its range)"}`
        : "",
      line.spread?.low.toFixed(1) ?? "",
      line.spread?.high.toFixed(1) ?? "",
      line.spread ? (100 * line.spread.yield).toFixed(1) : "",
      line.spread?.method ?? "",
      line.references,
      line.routedNets ?? "no data",
    ]),
    [],
    ["layer", "kind", "material", "thickness [um]", "Dk", "Df", "copper"],
    ...note.stackup.map((layer) => [
      layer.name,
      layer.kind,
      layer.material,
      (layer.thickness_m * 1e6).toFixed(1),
      layer.dk ?? "",
      layer.df ?? "",
      layer.copper ?? "",
    ]),
    [],
    ["caution", note.caution],
  ]);
}

function millimetres(metres: number): string {
  return (metres * 1000).toFixed(4);
}
