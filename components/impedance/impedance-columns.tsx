import type { DataColumn } from "@/components/ui/data-table";
import { VerdictMark } from "@/components/ui/verdict-mark";
import type { LengthUnit } from "@/lib/client/preferences";
import { columnDigits } from "./grids";
import type { ImpedanceRow } from "./impedance-rows";
import { ohms, remarks, signedPercent } from "./row-words";

type Column = DataColumn<ImpedanceRow>;

/** The columns; `narrow` leaves those that stand beside an open panel. */
export function impedanceColumns(unit: LengthUnit, narrow: boolean): Column[] {
  const length = (metres: number | null | undefined) =>
    metres === null || metres === undefined ? null : { text: columnDigits(metres, unit), unit };
  const columns: (Column & { beside?: boolean })[] = [
    {
      id: "class",
      header: "Class",
      width: 116,
      beside: true,
      cell: (row) => row.netClass.name,
      sortValue: (row) => row.netClass.name,
    },
    {
      id: "layer",
      header: "Layer",
      width: 88,
      beside: true,
      cell: (row) => <span className={row.allowed ? undefined : "text-ink-soft"}>{row.layer.name}</span>,
      sortValue: (row) => row.index,
    },
    {
      id: "target",
      header: "Target",
      width: 76,
      beside: true,
      kind: "number",
      number: (row) => ({ text: String(Number(row.target.toFixed(2))), unit: "Ω" }),
      sortValue: (row) => row.target,
      explanation: "Of a pair: differential",
    },
    {
      id: "tolerance",
      header: "±",
      width: 56,
      kind: "number",
      number: (row) => ({ text: String(row.tolerance), unit: "%" }),
      explanation: "Tolerance of the class",
    },
    {
      id: "width",
      header: "Width",
      width: 84,
      kind: "number",
      number: (row) => length(row.width),
      sortValue: (row) => row.width,
      explanation: "Foot width that the class has on this layer",
    },
    {
      id: "gap",
      header: "Gap",
      width: 86,
      kind: "number",
      number: (row) => (row.gapAssumed ? null : length(row.gap)),
      sortValue: (row) => row.gap,
      explanation: "Between the feet of a pair, as the class has it",
    },
    {
      id: "gives",
      header: "Gives",
      width: 80,
      beside: true,
      kind: "number",
      number: (row) => (row.now?.ok ? { text: ohms(row.now.value.impedance), unit: "Ω" } : null),
      sortValue: (row) => (row.now?.ok ? row.now.value.impedance : null),
      explanation: "Nominal impedance of the class’s width, by the closed form in use",
    },
    {
      id: "off",
      header: "Off",
      width: 76,
      kind: "number",
      number: (row) => (row.off === null ? null : { text: signedPercent(row.off), unit: "%" }),
      sortValue: (row) => (row.off === null ? null : Math.abs(row.off)),
      explanation: "Difference to the target",
    },
    {
      id: "verdict",
      header: "Centring",
      width: 88,
      beside: true,
      cell: (row) => <VerdictMark verdict={row.verdict} />,
      sortValue: (row) => ["fail", "near", "no data", "pass"].indexOf(row.verdict),
      explanation: "By the project’s rule of impedance centring",
    },
    {
      id: "meets",
      header: "Meets target",
      width: 108,
      beside: true,
      kind: "number",
      number: (row) => length(row.width0.ok ? row.width0.value.dimension : null),
      sortValue: (row) => (row.width0.ok ? row.width0.value.dimension : null),
      explanation: "Width that meets the target, on the grid; the gap of a pair stays",
    },
    {
      id: "there",
      header: "There",
      width: 72,
      kind: "number",
      number: (row) => (row.width0.ok ? { text: ohms(row.width0.value.impedance), unit: "Ω" } : null),
      explanation: "Impedance at that step of the grid",
    },
    {
      id: "gapMeets",
      header: "Or gap",
      width: 86,
      kind: "number",
      number: (row) => length(row.gap0?.ok ? row.gap0.value.dimension : null),
      explanation: "Of a pair: the gap that meets the target at the class’s width",
    },
    {
      id: "remarks",
      header: "Remarks",
      cell: (row) => {
        const words = remarks(row).join("; ");
        return (
          <span title={words} className="text-ink-soft">
            {words}
          </span>
        );
      },
    },
  ];
  return narrow ? columns.filter(({ beside }) => beside) : columns;
}
