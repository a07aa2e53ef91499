"use client";

import { memo, type ReactNode, useMemo } from "react";
import { DataTable } from "@/components/ui/data-table";
import type { LengthUnit } from "@/lib/client/preferences";
import { impedanceColumns } from "./impedance-columns";
import type { ImpedanceRow } from "./impedance-rows";
import { NarrowRows } from "./narrow-rows";

interface Props {
  rows: readonly ImpedanceRow[];
  unit: LengthUnit;
  /** A panel stands beside it. */
  beside: boolean;
  activeId: string | null;
  onActiveChange: (id: string | null) => void;
  onOpen: (row: ImpedanceRow) => void;
  empty: ReactNode;
}

const LABEL = "Impedance by class and layer";

/** Class × layer; drawn anew only when its rows change, not with every trial beside it. */
export const ImpedanceTable = memo(function ImpedanceTable(props: Props) {
  const { rows, unit, beside, activeId, onActiveChange, onOpen, empty } = props;
  const pairs = rows.some(({ line }) => line === "differential");
  const columns = useMemo(() => impedanceColumns(unit, { narrow: beside, pairs }), [unit, beside, pairs]);
  return (
    <>
      <div className="hidden sm:block print:block">
        <DataTable
          label={LABEL}
          rows={rows}
          columns={columns}
          rowId={(row) => row.id}
          keys="page"
          activeId={activeId}
          onActiveChange={onActiveChange}
          onOpen={onOpen}
          height="none"
          empty={empty}
        />
      </div>
      <div className="sm:hidden print:hidden">
        <NarrowRows
          label={`${LABEL}, narrow`}
          rows={rows}
          unit={unit}
          activeId={activeId}
          onOpen={onOpen}
          empty={empty}
        />
      </div>
    </>
  );
});
