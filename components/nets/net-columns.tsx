import Link from "next/link";
import type { Route } from "next";
import { CircleAlert, CircleCheck, CircleMinus } from "lucide-react";
import type { DataColumn } from "@/components/ui/data-table";
import type { LengthUnit } from "@/lib/client/preferences";
import type { NetRow } from "@/lib/client/nets";
import { lengthParts, scopeWords } from "./net-words";

const SCOPE_MARKS = { in: CircleCheck, out: CircleMinus, incomplete: CircleAlert } as const;
const SCOPE_TONES = { in: "text-ink", out: "text-ink-soft", incomplete: "text-near" } as const;

/** Columns of the table of nets, lengths in the reader's unit. */
export function netColumns(unit: LengthUnit, href: (net: NetRow) => string): DataColumn<NetRow>[] {
  return [
    {
      id: "name",
      header: "Net",
      kind: "mono",
      width: 190,
      sortValue: (net) => net.name,
      cell: (net) => (
        <Link
          href={href(net) as Route}
          className="hover:text-violet hover:underline"
          title={net.name}
          prefetch={false}
        >
          {net.name}
        </Link>
      ),
    },
    {
      id: "scope",
      header: "Scope",
      width: 176,
      sortValue: (net) => scopeWords(net),
      cell: (net) => <ScopeMark net={net} />,
    },
    {
      id: "class",
      header: "Class",
      width: 100,
      sortValue: (net) => net.className,
      cell: (net) => net.className ?? <span className="text-ink-soft">none</span>,
    },
    {
      id: "length",
      header: "Length",
      kind: "number",
      width: 96,
      sortValue: (net) => net.length_m,
      number: (net) => (net.sectionCount > 0 ? lengthParts(net.length_m, unit) : null),
    },
    count("pins", "Pins", (net) => net.pinCount),
    count("vias", "Vias", (net) => net.viaCount),
    {
      id: "layers",
      header: "Layers",
      sortValue: (net) => net.layers || null,
      cell: (net) => <span title={net.layers}>{net.layers || "–"}</span>,
    },
    {
      id: "pair",
      header: "Pair with",
      kind: "mono",
      width: 120,
      sortValue: (net) => net.pairPartner,
      cell: (net) => <span title={net.pairPartner ?? undefined}>{net.pairPartner ?? ""}</span>,
    },
    { id: "bus", header: "Bus", width: 80, sortValue: (net) => net.bus, cell: (net) => net.bus ?? "" },
    {
      id: "group",
      header: "Match group",
      width: 100,
      sortValue: (net) => net.matchGroup,
      cell: (net) => net.matchGroup ?? "",
    },
  ];
}

function ScopeMark({ net }: { net: NetRow }) {
  const Icon = SCOPE_MARKS[net.scope];
  return (
    <span className={`flex items-center gap-1.5 ${SCOPE_TONES[net.scope]}`}>
      <Icon size={14} aria-hidden="true" className="shrink-0" />
      <span className="truncate">{scopeWords(net)}</span>
    </span>
  );
}

function count(id: string, header: string, value: (net: NetRow) => number): DataColumn<NetRow> {
  return {
    id,
    header,
    kind: "number",
    width: 60,
    sortValue: value,
    number: (net) => ({ text: String(value(net)) }),
  };
}
