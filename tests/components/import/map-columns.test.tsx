// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it, vi } from "vitest";
import { ConfirmList } from "@/components/import/confirm-list";
import { fieldOf, withField, withLayer, withUnit } from "@/components/import/edit-mapping";
import { MapColumns } from "@/components/import/map-columns";
import type { ImportPreview, ListMapping } from "@/lib/schemas/import-list";

afterEach(cleanup);

const mapping: ListMapping = {
  kind: "section list",
  delimiter: ",",
  decimalComma: false,
  headerRow: 1,
  fields: {
    net: { column: 0, unit: null },
    width: { column: 1, unit: "mm" },
    length: { column: null, unit: "mm" },
  },
  layers: {},
};
const preview: ImportPreview = {
  columns: ["net", "w_mm", "len"],
  sample: [{ row: 2, cells: ["A", "0.1", "5"] }],
  fields: [
    { id: "net", label: "Net", required: true, isLength: false },
    { id: "width", label: "Width", required: true, isLength: true },
    { id: "length", label: "Length", required: true, isLength: true },
  ],
  missingFields: ["Length"],
  total: 10,
  good: 8,
  badRows: 2,
  blankRows: 0,
  skippedRows: 0,
  problems: [],
  problemCount: 2,
  duplicates: [],
  duplicateCount: 0,
  warnings: [],
  warningCount: 0,
  layers: [],
  copper: [],
  unknownClasses: [],
  effect: { things: "nets", added: 5, present: 1, absent: 3, incomplete: 2 },
};

describe("edit-mapping", () => {
  it("gives a field one column and a column one field", () => {
    const changed = withField(mapping, 1, "length");
    expect(fieldOf(changed, 1)).toBe("length");
    expect(changed.fields.width?.column).toBeNull();
    expect(fieldOf(withField(mapping, 0, ""), 0)).toBe("");
    expect(withUnit(mapping, "width", "mil").fields.width).toEqual({ column: 1, unit: "mil" });
    expect(withLayer(mapping, "TOP", "x").layers).toEqual({ TOP: "x" });
  });
});

describe("MapColumns", () => {
  it("lets a column be given a field and a unit, and names what is missing", async () => {
    const onChange = vi.fn();
    render(<MapColumns mapping={mapping} preview={preview} onChange={onChange} />);
    expect(screen.getByRole("alert").textContent).toContain("No column is chosen for length");
    const user = userEvent.setup();
    await user.selectOptions(screen.getByLabelText("What column len holds"), "Length *");
    expect(onChange).toHaveBeenLastCalledWith(withField(mapping, 2, "length"));
    await user.selectOptions(screen.getByLabelText("Unit of column width"), "mil");
    expect(onChange).toHaveBeenLastCalledWith(withUnit(mapping, "width", "mil"));
  });
});

describe("ConfirmList", () => {
  it("does not import while a required column is missing", () => {
    render(
      <ConfirmList preview={preview} reading={false} busy={false} onConfirm={vi.fn()} onDrop={vi.fn()} />,
    );
    expect(screen.getByRole<HTMLButtonElement>("button", { name: /^Import/ }).disabled).toBe(true);
  });

  it("says what comes in and what is left out, and replaces only where that is chosen", async () => {
    const onConfirm = vi.fn();
    render(
      <ConfirmList
        preview={{ ...preview, missingFields: [] }}
        reading={false}
        busy={false}
        onConfirm={onConfirm}
        onDrop={vi.fn()}
      />,
    );
    const user = userEvent.setup();
    const button = screen.getByRole("button", { name: "Import 8 rows, leave out 2" });
    await user.click(button);
    expect(onConfirm).toHaveBeenLastCalledWith("merge");
    await user.click(screen.getByRole("radio", { name: /Replace what is there/ }));
    expect(screen.getByText("Removes 3 nets that this list does not name.")).toBeTruthy();
    await user.click(button);
    expect(onConfirm).toHaveBeenLastCalledWith("replace");
  });
});
