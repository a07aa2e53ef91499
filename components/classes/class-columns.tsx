import type { Route } from "next";
import Link from "next/link";
import type { DataColumn } from "@/components/ui/data-table";
import type { LengthUnit } from "@/lib/client/preferences";
import type { NetClassRow } from "@/lib/client/net-classes";
import type { StoredModel } from "@/lib/schemas/model";
import { toSi } from "@/lib/si/units";
import { layerWords, type SignalLayer, terminationWords } from "./class-words";
import { typedQuantity } from "./field-words";

/** What is left beside an open panel, which shows all the rest. */
const BESIDE = new Set(["name", "nets", "target", "layers"]);

interface Options {
  /** A panel is open beside the table. */
  beside: boolean;
  layers: readonly SignalLayer[];
  models: readonly StoredModel[];
  unit: LengthUnit;
  netsOf: (netClass: NetClassRow) => string;
}

export function classColumns({ beside, layers, models, unit, netsOf }: Options): DataColumn<NetClassRow>[] {
  const names = new Map(models.map(({ lineageId, name }) => [lineageId, name]));
  const model = (lineageId: string | null) =>
    lineageId === null ? (
      <span className="text-ink-soft">as bound</span>
    ) : (
      <span title={names.get(lineageId)}>{names.get(lineageId) ?? "a model that is gone"}</span>
    );
  const columns: DataColumn<NetClassRow>[] = [
    {
      id: "name",
      header: "Name",
      width: 150,
      sortValue: (row) => row.name,
      cell: (row) => (
        <span className="font-medium" title={row.name}>
          {row.name}
        </span>
      ),
    },
    {
      id: "nets",
      header: "Nets",
      width: 64,
      sortValue: (row) => row.netCount,
      cell: (row) =>
        row.netCount > 0 ? (
          <Link
            href={netsOf(row) as Route}
            className="prose-link"
            aria-label={`${row.netCount} nets of class ${row.name}`}
          >
            {row.netCount.toLocaleString("en")}
          </Link>
        ) : (
          <span className="text-ink-soft">none</span>
        ),
    },
    {
      id: "kind",
      header: "Kind",
      width: 60,
      sortValue: (row) => row.kind,
      cell: (row) => (row.kind === "single" ? "single" : "pair"),
    },
    {
      id: "target",
      header: "Target",
      width: 116,
      sortValue: (row) => (row.targetImpedance ? toSi(row.targetImpedance, "resistance") : null),
      cell: (row) =>
        row.targetImpedance ? (
          `${typedQuantity(row.targetImpedance, "resistance")} ± ${row.tolerancePercent} %`
        ) : (
          <span className="text-near">no target</span>
        ),
    },
    {
      id: "layers",
      header: `Layers: width, gap in ${unit}`,
      width: 240,
      cell: (row) => {
        const words = layerWords(row, layers, unit);
        return words ? (
          <span title={`${words} ${unit}`}>{words}</span>
        ) : (
          <span className="text-near">no layer yet</span>
        );
      },
    },
    {
      id: "driver",
      header: "Driver",
      width: 112,
      explanation: "For pins to which no binding gives a model",
      cell: (row) => model(row.driverModelLineageId),
    },
    {
      id: "receiver",
      header: "Receiver",
      width: 112,
      explanation: "For pins to which no binding gives a model",
      cell: (row) => model(row.receiverModelLineageId),
    },
    {
      id: "edge",
      header: "Edge 10–90 %",
      width: 100,
      sortValue: (row) => (row.edge ? toSi(row.edge, "time") : null),
      cell: (row) =>
        row.edge ? typedQuantity(row.edge, "time") : <span className="text-ink-soft">the driver’s</span>,
    },
    {
      id: "rate",
      header: "Rate",
      width: 90,
      sortValue: (row) => (row.rate ? toSi(row.rate, "frequency") : null),
      cell: (row) => typedQuantity(row.rate, "frequency") || <span className="text-ink-soft">–</span>,
    },
    {
      id: "termination",
      header: "Termination",
      width: 116,
      sortValue: (row) => row.termination.scheme,
      cell: (row) => (
        <span title={terminationWords(row.termination)}>{terminationWords(row.termination)}</span>
      ),
    },
  ];
  return beside ? columns.filter(({ id }) => BESIDE.has(id)) : columns;
}
