import type { DataColumn } from "@/components/ui/data-table";
import { KIND_WORDS } from "@/components/nets/net-words";
import type { DraftProposals } from "@/lib/schemas/name-proposals";

type ScopeProposal = DraftProposals["outOfScope"][number];
type PairProposal = DraftProposals["pairs"][number];

export const SCOPES: readonly DataColumn<ScopeProposal>[] = [
  { id: "net", header: "Net", kind: "mono", width: 240, sortValue: (row) => row.net, cell: (row) => row.net },
  {
    id: "kind",
    header: "Kind",
    width: 100,
    sortValue: (row) => row.kind,
    cell: (row) => KIND_WORDS[row.kind] ?? row.kind,
  },
  { id: "reason", header: "Why", sortValue: (row) => row.reason, cell: (row) => row.reason },
];
export const PAIRS: readonly DataColumn<PairProposal>[] = [
  {
    id: "name",
    header: "Pair",
    kind: "mono",
    width: 220,
    sortValue: (row) => row.name,
    cell: (row) => row.name,
  },
  {
    id: "positive",
    header: "Positive",
    kind: "mono",
    width: 220,
    sortValue: (row) => row.positive.net,
    cell: (row) => row.positive.net,
  },
  {
    id: "negative",
    header: "Negative",
    kind: "mono",
    sortValue: (row) => row.negative.net,
    cell: (row) => row.negative.net,
  },
  { id: "how", header: "By", width: 90, cell: (row) => row.how },
];
export const BUSES: readonly DataColumn<DraftProposals["buses"][number]>[] = [
  {
    id: "label",
    header: "Bus",
    kind: "mono",
    sortValue: (row) => row.name,
    cell: (row) => <span title={row.label}>{row.label}</span>,
  },
  {
    id: "nets",
    header: "Nets",
    kind: "number",
    width: 100,
    sortValue: (row) => row.members.length,
    number: (row) => ({ text: String(row.members.length) }),
  },
];
export const GROUPS: readonly DataColumn<DraftProposals["matchGroups"][number]>[] = [
  { id: "name", header: "Match group", width: 220, sortValue: (row) => row.name, cell: (row) => row.name },
  {
    id: "nets",
    header: "Nets",
    kind: "number",
    width: 100,
    sortValue: (row) => row.ids.length,
    number: (row) => ({ text: String(row.ids.length) }),
  },
  { id: "why", header: "Why", cell: (row) => <span title={row.reason}>{row.reason}</span> },
];
