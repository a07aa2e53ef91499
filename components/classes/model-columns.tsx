import { Badge } from "@/components/ui/badge";
import type { DataColumn } from "@/components/ui/data-table";
import type { StoredModel } from "@/lib/schemas/model";
import { type Dimension, type Quantity, toSi } from "@/lib/si/units";
import { typedQuantity } from "./field-words";
import { type ModelUse, NO_USE, wordsOfUse } from "./model-use";

/** What is left beside an open panel, which shows all the rest. */
const BESIDE = new Set(["name", "role", "resistance", "use"]);

/** @param beside  a panel is open beside the table */
export function modelColumns(
  uses: ReadonlyMap<string, ModelUse>,
  beside: boolean,
): DataColumn<StoredModel>[] {
  const usedBy = (row: StoredModel) => uses.get(row.lineageId) ?? NO_USE;
  const columns: DataColumn<StoredModel>[] = [
    {
      id: "name",
      header: "Name",
      width: 200,
      sortValue: (row) => row.name,
      cell: (row) => (
        <span className="font-medium" title={row.name}>
          {row.name}
        </span>
      ),
    },
    {
      id: "technology",
      header: "Technology",
      width: 110,
      sortValue: (row) => row.technology,
      cell: (row) => row.technology || "–",
    },
    {
      id: "role",
      header: "Can",
      width: 130,
      sortValue: (row) => `${row.driver ? 1 : 0}${row.receiver ? 1 : 0}`,
      cell: (row) =>
        [row.driver ? "drive" : null, row.receiver ? "receive" : null].filter(Boolean).join(", "),
    },
    {
      id: "resistance",
      header: "Driver slow / typ / fast",
      width: 160,
      explanation: "Output resistance at the pin",
      sortValue: (row) => (row.driver ? toSi(row.driver.resistance.typical, "resistance") : null),
      cell: (row) =>
        row.driver
          ? three(
              [row.driver.resistance.slow, row.driver.resistance.typical, row.driver.resistance.fast],
              "resistance",
            )
          : none,
    },
    {
      id: "rise",
      header: "Rise slow / typ / fast",
      width: 150,
      explanation: "10–90 % rise time of the open-circuit wave",
      sortValue: (row) => (row.driver ? toSi(row.driver.riseTime.typical, "time") : null),
      cell: (row) =>
        row.driver
          ? three([row.driver.riseTime.slow, row.driver.riseTime.typical, row.driver.riseTime.fast], "time")
          : none,
    },
    {
      id: "load",
      header: "Load min / typ / max",
      width: 140,
      explanation: "Input capacitance",
      sortValue: (row) => (row.receiver ? toSi(row.receiver.capacitance.typical, "capacitance") : null),
      cell: (row) =>
        row.receiver
          ? three(
              [row.receiver.capacitance.min, row.receiver.capacitance.typical, row.receiver.capacitance.max],
              "capacitance",
            )
          : none,
    },
    {
      id: "thresholds",
      header: "VIL / VIH",
      width: 110,
      cell: (row) =>
        row.receiver?.vil && row.receiver.vih ? (
          two(row.receiver.vil, row.receiver.vih)
        ) : row.receiver ? (
          <span className="text-near">not given</span>
        ) : (
          none
        ),
    },
    {
      id: "origin",
      header: "Origin",
      width: 100,
      sortValue: (row) => row.origin,
      cell: (row) => <Badge tone={row.origin === "assumed" ? "near" : "plain"}>{row.origin}</Badge>,
    },
    {
      id: "use",
      header: "Used by",
      width: 150,
      sortValue: (row) => usedBy(row).classes.length + usedBy(row).bindings,
      cell: (row) => (
        <span
          className={wordsOfUse(usedBy(row)) === "nothing" ? "text-ink-soft" : undefined}
          title={usedBy(row).classes.join(", ")}
        >
          {wordsOfUse(usedBy(row))}
        </span>
      ),
    },
  ];
  return beside ? columns.filter(({ id }) => BESIDE.has(id)) : columns;
}

const none = <span className="text-ink-soft">–</span>;

/** "27 / 19 / 14 Ω" where the units agree, else each with its own. */
function three(values: readonly Quantity[], dimension: Dimension): string {
  const texts = values.map((value) => typedQuantity(value, dimension));
  const units = new Set(texts.map((text) => text.split(" ")[1] ?? ""));
  if (units.size > 1) return texts.join(" / ");
  return `${texts.map((text) => text.split(" ")[0]).join(" / ")} ${[...units][0] ?? ""}`;
}

function two(a: Quantity, b: Quantity): string {
  return three([a, b], "voltage");
}
