"use client";

interface Props<Row extends { row: number; problems: readonly string[] }> {
  rows: readonly Row[];
  name: (row: Row) => string;
  says: (row: Row) => string;
}

/** What pasted rows would do, row by row, and why one of them cannot be taken. */
export function PastePreview<Row extends { row: number; problems: readonly string[] }>({
  rows,
  name,
  says,
}: Props<Row>) {
  return (
    <div className="border-rule-line max-h-64 overflow-auto border-y">
      <table className="w-full text-left text-xs" aria-label="What the rows would do">
        <thead>
          <tr className="text-ink-soft">
            <th className="w-12 px-2 py-1 font-normal">Row</th>
            <th className="px-2 py-1 font-normal">What</th>
            <th className="px-2 py-1 font-normal">Would be</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.row} className="border-rule-line/60 border-t align-top">
              <td className="px-2 py-1">{row.row}</td>
              <td className="px-2 py-1">{name(row) || "–"}</td>
              <td className="px-2 py-1">
                {row.problems.length > 0 ? (
                  <ul className="text-fail">
                    {row.problems.map((problem) => (
                      <li key={problem}>{problem}</li>
                    ))}
                  </ul>
                ) : (
                  says(row)
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
