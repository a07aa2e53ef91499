// @vitest-environment jsdom
import { cleanup, render, screen, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { Tooltip } from "radix-ui";
import { useState } from "react";
import { afterEach, beforeAll, describe, expect, it, vi } from "vitest";
import { type DataColumn, DataTable, type RowSelectionState } from "@/components/ui/data-table";

interface Net {
  name: string;
  delay: number | null;
}

const NETS: Net[] = [
  { name: "D10", delay: 12.5 },
  { name: "D2", delay: null },
  { name: "D1", delay: 3.25 },
];

const COLUMNS: DataColumn<Net>[] = [
  { id: "name", header: "Net", cell: (net) => net.name, sortValue: (net) => net.name },
  {
    id: "delay",
    header: "Delay",
    kind: "number",
    number: (net) => (net.delay === null ? null : { text: String(net.delay), unit: "ps" }),
    sortValue: (net) => net.delay,
  },
];

beforeAll(() => {
  // jsdom lays nothing out and so has nowhere to scroll.
  Object.defineProperty(Element.prototype, "scrollIntoView", { value: () => undefined });
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
afterEach(cleanup);

function names() {
  return screen
    .getAllByRole("row")
    .slice(1)
    .map((row) => within(row).getAllByRole("cell").at(-2)?.textContent);
}

function Harness({ rows = NETS, onOpen = () => undefined }: { rows?: Net[]; onOpen?: (net: Net) => void }) {
  const [selection, setSelection] = useState<RowSelectionState>({});
  return (
    <Tooltip.Provider>
      <DataTable
        label="Nets"
        rows={rows}
        columns={COLUMNS}
        rowId={(net) => net.name}
        onOpen={onOpen}
        selection={selection}
        onSelectionChange={setSelection}
      />
      <output>{Object.keys(selection).sort().join(" ")}</output>
    </Tooltip.Provider>
  );
}

describe("data table", () => {
  it("sorts names as people count and puts absent numbers last both ways", async () => {
    const user = userEvent.setup();
    render(<Harness />);
    await user.click(screen.getByRole("button", { name: "Net" }));
    expect(names()).toEqual(["D1", "D2", "D10"]);
    expect(screen.getByRole("columnheader", { name: "Net" }).getAttribute("aria-sort")).toBe("ascending");

    const delay = screen.getByRole("button", { name: "Delay" });
    await user.click(delay);
    expect(names().at(-1)).toBe("D2");
    await user.click(delay);
    expect(names().at(-1)).toBe("D2");
  });

  it("goes through rows with j and k, opens with Enter, ticks with Space", async () => {
    const user = userEvent.setup();
    const onOpen = vi.fn();
    render(<Harness onOpen={onOpen} />);
    const first = screen.getAllByRole("row")[1];
    first?.focus();
    await user.keyboard("j{Enter}");
    expect(onOpen).toHaveBeenLastCalledWith(NETS[1]);
    await user.keyboard("k ");
    expect(screen.getByRole("status").textContent).toBe("D10");
  });

  it("reserves the digits that align a column on its decimal point", () => {
    render(<Harness />);
    const cell = screen.getByRole("row", { name: /D10/ }).querySelector("td:last-child");
    expect(cell?.querySelector(".invisible")?.textContent).toBe("0");
  });

  it("keeps beyond 200 rows only those in view in the page, and still counts all", () => {
    const rows = Array.from({ length: 10_000 }, (_, index) => ({ name: `N${index}`, delay: index }));
    render(<Harness rows={rows} />);
    expect(screen.getAllByRole("row").length).toBeLessThan(120);
    expect(screen.getByRole("table").getAttribute("aria-rowcount")).toBe("10001");
  });
});
