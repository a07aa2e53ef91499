import type { DataColumn } from "@/components/ui/data-table";
import type { LengthUnit } from "@/lib/client/preferences";
import { MarkedNumber } from "./marked-number";
import { columnDigits } from "./grids";
import type { ImpedanceRow } from "./impedance-rows";
import { capabilityWords, formulaDifference, ohms, remarks, signedPercent, yieldPercent } from "./row-words";

type Column = DataColumn<ImpedanceRow>;

/** Stands where an answer is on its way. */
export const COMING = "…";

interface Choice {
  /** only those that stand beside an open panel */
  narrow: boolean;
  /** some row is of a pair */
  pairs: boolean;
}

export function impedanceColumns(unit: LengthUnit, { narrow, pairs }: Choice): Column[] {
  const length = (metres: number | null | undefined) =>
    metres === null || metres === undefined ? null : { text: columnDigits(metres, unit), unit };
  const answered = (row: ImpedanceRow, number: { text: string; unit: string } | null) =>
    row.pending ? { text: COMING } : number;
  const columns: (Column & { beside?: boolean; ofPairs?: boolean })[] = [
    {
      id: "class",
      header: "Class",
      width: 108,
      beside: true,
      cell: (row) => <span title={row.netClass.name}>{row.netClass.name}</span>,
      sortValue: (row) => row.netClass.name,
    },
    {
      id: "layer",
      header: "Layer",
      width: 86,
      beside: true,
      cell: (row) => (
        <span title={row.layer.name} className={row.allowed ? undefined : "text-ink-soft"}>
          {row.layer.name}
        </span>
      ),
      sortValue: (row) => row.index,
    },
    {
      id: "target",
      header: "Target",
      width: 60,
      beside: true,
      kind: "number",
      number: (row) => ({ text: String(Number(row.target.toFixed(2))), unit: "Ω" }),
      sortValue: (row) => row.target,
      explanation: "Of a pair: differential",
    },
    {
      id: "tolerance",
      header: "±",
      width: 48,
      kind: "number",
      number: (row) => ({ text: String(row.tolerance), unit: "%" }),
      explanation: "Tolerance of the class",
    },
    {
      id: "width",
      header: "Width",
      width: 86,
      kind: "number",
      number: (row) => length(row.width),
      sortValue: (row) => row.width,
      explanation: "Foot width that the class has on this layer",
    },
    {
      id: "gap",
      header: "Gap",
      ofPairs: true,
      width: 86,
      kind: "number",
      number: (row) => (row.gapAssumed ? null : length(row.gap)),
      sortValue: (row) => row.gap,
      explanation: "Between the feet of a pair, as the class has it",
    },
    {
      id: "gives",
      header: "Gives",
      width: 66,
      beside: true,
      kind: "number",
      number: (row) => answered(row, row.now?.ok ? { text: ohms(row.now.value.impedance), unit: "Ω" } : null),
      sortValue: (row) => (row.now?.ok ? row.now.value.impedance : null),
      explanation: "Nominal impedance of the class’s width, by the 2-D field solution",
    },
    {
      id: "centring",
      header: "Off target",
      width: 82,
      beside: true,
      cell: (row) => (
        <MarkedNumber
          verdict={row.pending ? null : row.centring}
          text={row.pending ? COMING : row.off === null ? null : signedPercent(row.off)}
        />
      ),
      sortValue: (row) => (row.off === null ? null : Math.abs(row.off)),
      explanation: "Difference to the target, judged by the project’s rule of impedance centring",
    },
    {
      id: "formula",
      header: "Formula",
      width: 70,
      kind: "number",
      number: (row) => {
        const difference = formulaDifference(row);
        return answered(row, difference === null ? null : { text: signedPercent(difference), unit: "%" });
      },
      sortValue: (row) => {
        const difference = formulaDifference(row);
        return difference === null ? null : Math.abs(difference);
      },
      explanation: "Difference of the published closed form to the field solution",
    },
    {
      id: "spread",
      header: "Spread",
      width: 104,
      kind: "number",
      number: (row) =>
        row.spreadPending
          ? { text: COMING }
          : row.spread?.ok
            ? { text: `${ohms(row.spread.value.low)}–${ohms(row.spread.value.high)}`, unit: "Ω" }
            : null,
      sortValue: (row) => (row.spread?.ok ? row.spread.value.high - row.spread.value.low : null),
      explanation: "Predicted for production: 0.5th to 99.5th percentile",
    },
    {
      id: "yield",
      header: "Yield",
      width: 82,
      beside: true,
      cell: (row) => (
        <MarkedNumber
          verdict={row.spreadPending ? null : row.yielding}
          text={row.spreadPending ? COMING : row.spread?.ok ? yieldPercent(row.spread.value.yield) : null}
        />
      ),
      sortValue: (row) => (row.spread?.ok ? row.spread.value.yield : null),
      explanation:
        "Predicted share of production within the tolerance, judged by the rule of impedance yield",
    },
    {
      id: "meets",
      header: "Meets at",
      width: 86,
      beside: true,
      kind: "number",
      number: (row) => answered(row, length(row.meets?.ok ? row.meets.value.dimension : null)),
      sortValue: (row) => (row.meets?.ok ? row.meets.value.dimension : null),
      explanation: "Width that meets the target, on the grid; the gap of a pair stays",
    },
    {
      id: "there",
      header: "There",
      width: 66,
      kind: "number",
      number: (row) =>
        answered(row, row.meets?.ok ? { text: ohms(row.meets.value.impedance), unit: "Ω" } : null),
      explanation: "Impedance at that step of the grid",
    },
    {
      id: "gapMeets",
      header: "Or gap",
      ofPairs: true,
      width: 86,
      kind: "number",
      number: (row) => answered(row, length(row.gapMeets?.ok ? row.gapMeets.value.dimension : null)),
      explanation: "Of a pair: the gap that meets the target at the class’s width",
    },
    { id: "remarks", header: "Remarks", cell: (row) => <Remarks row={row} unit={unit} short /> },
  ];
  return columns.filter(({ beside, ofPairs }) => (beside || !narrow) && (pairs || !ofPairs));
}

/** What cannot be etched comes first and in the colour of a warning. */
export function Remarks({
  row,
  unit,
  short = false,
}: {
  row: ImpedanceRow;
  unit: LengthUnit;
  /** for a column: the whole of it is in its title */
  short?: boolean;
}) {
  const warned = capabilityWords(row, unit).length > 0;
  const words = remarks(row, unit).join("; ");
  return (
    <span title={words} className={warned ? "text-near" : "text-ink-soft"}>
      {short ? remarks(row, unit, true).join("; ") : words}
    </span>
  );
}
