import { Button } from "@/components/ui/button";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { Select } from "@/components/ui/select";
import type { BoardContents, BoardList, NeighbourRows } from "@/lib/formats/ipc2581/contents";
import type { BoardProblem } from "@/lib/formats/ipc2581/document";
import type { ListKind } from "@/lib/schemas/import-list";
import { KIND_LABELS, rows } from "./list-words";

interface Props {
  name: string;
  contents: BoardContents;
  /** null while they are sought. */
  neighbours: NeighbourRows | null;
  busy: boolean;
  distance: number;
  onDistance: (distance_m: number) => void;
  onList: (list: { body: string; name: string; kind: ListKind }) => void;
}

const DISTANCES = [
  { metres: 0.2e-3, label: "0.2 mm (8 mil)" },
  { metres: 0.3e-3, label: "0.3 mm (12 mil)" },
  { metres: 0.5e-3, label: "0.5 mm (20 mil)" },
  { metres: 1e-3, label: "1 mm (39 mil)" },
];
const COLUMNS: readonly DataColumn<BoardProblem & { id: string }>[] = [
  {
    id: "line",
    header: "Line",
    kind: "number",
    width: 90,
    sortValue: (problem) => problem.line,
    number: (problem) => ({ text: String(problem.line) }),
  },
  {
    id: "element",
    header: "Element",
    kind: "mono",
    width: 150,
    sortValue: (problem) => problem.element,
    cell: (problem) => problem.element,
  },
  {
    id: "reason",
    header: "Reason",
    cell: (problem) => <span title={problem.reason}>{problem.reason}</span>,
  },
];
const number = (count: number) => count.toLocaleString("en");

/** What the file holds, what of it could not be used, and its lists, each to be looked at before it is kept. */
export function BoardPreview({ name, contents, neighbours, busy, distance, onDistance, onList }: Props) {
  const { counts, layers, problems, problemCount } = contents;
  const bare = counts.nets - counts.routed;
  const lists: { kind: ListKind; list: BoardList | null; what: string }[] = [
    { kind: "parts list", list: contents.partsList, what: "First, so that pins are known by their parts." },
    {
      kind: "section list",
      list: contents.sectionList,
      what: "Its layers are mapped to the stackup's there.",
    },
    {
      kind: "neighbour list",
      list: neighbours,
      what: "Side by side on one layer, within the distance below.",
    },
  ];
  return (
    <div className="border-copper bg-sheet flex flex-col gap-4 border-l-2 px-4 py-3">
      <p role="status" className="max-w-prose text-sm">
        <span className="font-medium">{name}</span>, revision {contents.revision || "not stated"}
        {contents.step ? `, ${contents.step}` : ""}: {number(counts.routed)} routed nets with{" "}
        {number(counts.sections)} sections, {number(counts.parts)} parts, {number(counts.pins)} connected
        pins, {number(counts.holes)} holes, {number(counts.vias)} of them vias.
        {bare > 0 ? ` ${number(bare)} nets have no routed section and do not come in.` : ""}
        {contents.plies > 0
          ? ` Its stackup of ${number(contents.plies)} plies is not taken over; the project's own counts.`
          : ""}
      </p>
      <p className="max-w-prose text-sm">
        Copper layers:{" "}
        {layers
          .map((layer) => `${layer.name} (${layer.plane ? "plane, " : ""}${number(layer.sections)} sections)`)
          .join(", ")}
        .
      </p>
      <ul className="flex flex-col gap-2">
        {lists.map(({ kind, list, what }) => (
          <li key={kind} className="flex flex-wrap items-center gap-3 text-sm">
            <Button
              busy={busy}
              disabled={!list || list.rows === 0}
              onClick={() => list && onList({ body: list.text, name: `${name}, ${kind}`, kind })}
            >
              Preview the {KIND_LABELS[kind].toLowerCase()}
            </Button>
            <span>{list ? rows(list.rows) : "Being sought…"}</span>
            <span className="text-ink-soft">{what}</span>
          </li>
        ))}
      </ul>
      <Select
        label="Neighbours within, edge to edge"
        fieldClassName="max-w-60"
        value={String(distance)}
        options={DISTANCES.map(({ metres, label }) => ({ value: String(metres), label }))}
        onChange={(event) => onDistance(Number(event.target.value))}
      />
      {neighbours && neighbours.touching.length > 0 ? (
        <p className="text-near max-w-prose text-sm">
          Copper of {number(neighbours.touching.length)} pair{neighbours.touching.length === 1 ? "" : "s"} of
          nets meets, such as {neighbours.touching[0]?.net} and {neighbours.touching[0]?.other} on{" "}
          {neighbours.touching[0]?.layer}. Such pairs are in no row; look at them in the layout.
        </p>
      ) : null}
      {problemCount > 0 ? (
        <div className="flex flex-col gap-2">
          <h3 className="font-semibold">
            {number(problemCount)} problem{problemCount === 1 ? "" : "s"} in the file
          </h3>
          <DataTable
            label="Problems in the board file"
            height="16rem"
            columns={COLUMNS}
            rows={problems.map((problem, index) => ({ ...problem, id: String(index) }))}
            rowId={(problem) => problem.id}
          />
          {problemCount > problems.length ? (
            <p className="text-ink-soft text-xs">
              The first {number(problems.length)} of {number(problemCount)}.
            </p>
          ) : null}
        </div>
      ) : null}
    </div>
  );
}
