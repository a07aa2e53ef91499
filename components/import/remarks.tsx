import { Download } from "lucide-react";
import { type DataColumn, DataTable } from "@/components/ui/data-table";
import { buttonClasses } from "@/components/ui/button";
import type { ImportPreview, ImportRemark } from "@/lib/schemas/import-list";
import { rows } from "./list-words";

interface Props {
  preview: ImportPreview;
  /** Where the whole report is downloaded. */
  download: string;
}

const COLUMNS: readonly DataColumn<ImportRemark & { id: string }>[] = [
  {
    id: "row",
    header: "Row",
    kind: "number",
    width: 60,
    sortValue: (remark) => remark.row,
    number: (remark) => ({ text: String(remark.row) }),
  },
  {
    id: "column",
    header: "Column",
    width: 88,
    sortValue: (remark) => remark.column,
    cell: (remark) => remark.column,
  },
  {
    id: "value",
    header: "Value",
    kind: "mono",
    width: 120,
    sortValue: (remark) => remark.value,
    cell: (remark) => <span title={remark.value}>{remark.value || "–"}</span>,
  },
  {
    id: "reason",
    header: "Reason",
    cell: (remark) => <span title={remark.reason}>{remark.reason}</span>,
  },
];

/** What is not taken, what was given twice, and what comes in with a remark: each by row, column, value and reason. */
export function Remarks({ preview, download }: Props) {
  const { problems, problemCount, badRows, duplicates, duplicateCount, warnings, warningCount } = preview;
  return (
    <>
      {badRows > 0 ? (
        <section aria-labelledby="bad-rows" className="flex flex-col gap-2">
          <div className="flex flex-wrap items-center justify-between gap-2">
            <h2 id="bad-rows" className="text-lg font-semibold">
              {rows(badRows)} not taken
            </h2>
            <a href={download} download className={buttonClasses({})}>
              <Download size={14} aria-hidden="true" />
              Save the report
            </a>
          </div>
          <RemarkTable label="Rows not taken" remarks={problems} count={problemCount} />
        </section>
      ) : null}
      {duplicateCount > 0 ? (
        <section aria-labelledby="duplicates" className="flex flex-col gap-2">
          <h2 id="duplicates" className="text-lg font-semibold">
            {rows(duplicateCount)} given twice
          </h2>
          <p className="text-ink-soft max-w-prose text-sm">
            Each says the very same as an earlier row, so it is one piece of copper and is taken once.
          </p>
          <RemarkTable
            label="Rows given twice"
            count={duplicateCount}
            remarks={duplicates.map(({ row, firstRow, text }) => ({
              row,
              column: "whole row",
              value: text,
              reason: `The same as row ${firstRow}; taken once.`,
            }))}
          />
        </section>
      ) : null}
      {warningCount > 0 ? (
        <section aria-labelledby="warnings" className="flex flex-col gap-2">
          <h2 id="warnings" className="text-lg font-semibold">
            {warningCount.toLocaleString("en")} remark{warningCount === 1 ? "" : "s"}
          </h2>
          <p className="text-ink-soft max-w-prose text-sm">
            These rows come in. Look at them when there is time.
          </p>
          <RemarkTable label="Remarks" remarks={warnings} count={warningCount} />
        </section>
      ) : null}
      {preview.unknownClasses.length > 0 ? (
        <p className="text-near max-w-prose text-sm">
          {preview.unknownClasses
            .slice(0, 6)
            .map(({ name, rows: count }) => `${name} (${rows(count)})`)
            .join(", ")}
          : no class of this draft has that name. The nets come in without a class; make the class and set it
          in bulk.
        </p>
      ) : null}
    </>
  );
}

function RemarkTable({
  label,
  remarks,
  count,
}: {
  label: string;
  remarks: readonly ImportRemark[];
  count: number;
}) {
  return (
    <>
      <DataTable
        label={label}
        height="20rem"
        columns={COLUMNS}
        rows={remarks.map((remark, index) => ({ ...remark, id: String(index) }))}
        rowId={(remark) => remark.id}
      />
      {count > remarks.length ? (
        <p className="text-ink-soft text-xs">
          The first {remarks.length} of {count.toLocaleString("en")}; the report holds them all.
        </p>
      ) : null}
    </>
  );
}
