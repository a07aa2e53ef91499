"use client";

import { VerdictMark } from "@/components/ui/verdict-mark";
import type { LengthUnit } from "@/lib/client/preferences";
import { columnDigits } from "./grids";
import { COMING, Remarks } from "./impedance-columns";
import type { ImpedanceRow } from "./impedance-rows";
import { ohms, signedPercent, yieldPercent } from "./row-words";

interface Props {
  label: string;
  rows: readonly ImpedanceRow[];
  unit: LengthUnit;
  activeId: string | null;
  onOpen: (row: ImpedanceRow) => void;
  empty: React.ReactNode;
}

/** The table for a narrow screen: every row a block of three lines, the same facts in the same places. */
export function NarrowRows({ label, rows, unit, activeId, onOpen, empty }: Props) {
  if (rows.length === 0)
    return <p className="text-ink-soft border-rule-line border-y py-6 text-sm">{empty}</p>;
  return (
    <table role="table" aria-label={label} className="border-rule-line bg-sheet block border-t text-sm">
      <thead role="rowgroup" className="sr-only">
        <tr role="row">
          {["Class and layer", "Gives", "Width", "Yield", "Meets the target at", "Remarks"].map((name) => (
            <th key={name} role="columnheader" scope="col">
              {name}
            </th>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup" className="block">
        {rows.map((row) => (
          <tr
            key={row.id}
            role="row"
            tabIndex={0}
            aria-current={row.id === activeId ? "true" : undefined}
            onClick={() => onOpen(row)}
            onKeyDown={(event) => {
              if (event.key !== "Enter") return;
              event.preventDefault();
              onOpen(row);
            }}
            className={`border-rule-line grid cursor-pointer grid-cols-[1fr_auto] gap-x-3 gap-y-0.5 border-b px-2 py-2.5 -outline-offset-2 ${row.id === activeId ? "bg-copper/10" : ""}`}
          >
            <NarrowCells row={row} unit={unit} />
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function NarrowCells({ row, unit }: { row: ImpedanceRow; unit: LengthUnit }) {
  const { now, off, meets, spread, centring, yielding } = row;
  const size = (metres: number) => columnDigits(metres, unit);
  const own =
    row.width === null
      ? "no width yet"
      : `${size(row.width)}${row.gap === null || row.gapAssumed ? "" : ` / ${size(row.gap)}`}\u2009${unit}`;
  return (
    <>
      <td role="cell" className="min-w-0 truncate font-medium">
        {row.netClass.name} <span className="text-ink-soft font-normal">on {row.layer.name}</span>
      </td>
      <td role="cell" className="flex items-center justify-end gap-2 whitespace-nowrap">
        {row.pending ? COMING : now?.ok ? <Ohms value={now.value.impedance} /> : "–"}
        {off === null ? null : (
          <span className="text-ink-soft">
            {signedPercent(off)}
            {"\u2009%"}
          </span>
        )}
        {row.pending || !centring ? null : <VerdictMark verdict={centring} wordHidden />}
      </td>
      <td role="cell" className="text-ink-soft min-w-0 truncate">
        <span className="text-ink">{own}</span>, {Number(row.target.toFixed(2))}
        {"\u2009Ω"} ±{row.tolerance}
        {"\u2009%"}
      </td>
      <td role="cell" className="flex items-center justify-end gap-2 whitespace-nowrap">
        {row.spreadPending ? (
          COMING
        ) : spread?.ok ? (
          <>
            <span className="text-ink-soft">yield</span> {yieldPercent(spread.value.yield)}
            {"\u2009%"}
            {yielding ? <VerdictMark verdict={yielding} wordHidden /> : null}
          </>
        ) : null}
      </td>
      <td role="cell" className="text-ink-soft col-span-2 min-w-0">
        {row.pending ? (
          COMING
        ) : meets?.ok ? (
          <>
            meets at {size(meets.value.dimension)}
            {`\u2009${unit}`} (<Ohms value={meets.value.impedance} />)
          </>
        ) : null}
      </td>
      <td role="cell" className="col-span-2 min-w-0 text-xs empty:hidden">
        <Remarks row={row} unit={unit} />
      </td>
    </>
  );
}

function Ohms({ value }: { value: number }) {
  return (
    <span>
      {ohms(value)}
      <span className="text-ink-soft">{"\u2009Ω"}</span>
    </span>
  );
}
