// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it, vi } from "vitest";
import { BoardFilePanel } from "@/components/import/board-file";
import { BoardPreview } from "@/components/import/board-preview";
import type { BoardContents } from "@/lib/formats/ipc2581/contents";

afterEach(cleanup);

const contents: BoardContents = {
  revision: "C",
  step: "tide gauge",
  counts: { nets: 12, routed: 9, sections: 1200, parts: 3, pins: 40, holes: 22, vias: 20 },
  layers: [
    { name: "TOP", plane: false, sections: 1200 },
    { name: "GND", plane: true, sections: 0 },
  ],
  plies: 0,
  problems: [{ line: 77, element: "Polyline", reason: "of net A has no line width above zero; left out." }],
  problemCount: 1,
  partsList: { text: "reference\r\nU1\r\n", rows: 3 },
  sectionList: { text: "net,from\r\n", rows: 1200 },
};

describe("BoardPreview", () => {
  it("tells what the file holds, its problems by line, and hands over one list at a time", async () => {
    const onList = vi.fn();
    const onDistance = vi.fn();
    render(
      <BoardPreview
        name="gauge.xml"
        contents={contents}
        neighbours={{ text: "net\r\n", rows: 0, touching: [{ net: "A", other: "B", layer: "TOP" }] }}
        busy={false}
        distance={0.5e-3}
        onDistance={onDistance}
        onList={onList}
      />,
    );
    expect(screen.getByRole("status").textContent).toContain(
      "9 routed nets with 1,200 sections, 3 parts, 40 connected pins, 22 holes, 20 of them vias. 3 nets have no routed section",
    );
    expect(screen.getByText(/GND \(plane, 0 sections\)/)).toBeDefined();
    expect(screen.getByText(/Copper of 1 pair of nets meets, such as A and B on TOP/)).toBeDefined();
    expect(screen.getByRole("heading", { name: "1 problem in the file" })).toBeDefined();
    const neighbours = screen.getByRole<HTMLButtonElement>("button", { name: "Preview the neighbour list" });
    expect(neighbours.disabled).toBe(true);
    const user = userEvent.setup();
    await user.click(screen.getByRole("button", { name: "Preview the section list" }));
    expect(onList).toHaveBeenCalledExactlyOnceWith({
      body: "net,from\r\n",
      name: "gauge.xml, section list",
      kind: "section list",
    });
    await user.selectOptions(screen.getByLabelText("Neighbours within, edge to edge"), "0.3 mm (12 mil)");
    expect(onDistance).toHaveBeenCalledWith(0.3e-3);
  });
});

describe("BoardFilePanel", () => {
  const board = { read: vi.fn(), search: vi.fn(), forget: vi.fn() };

  it("shows how far reading is, and lets it be stopped", async () => {
    const state = { phase: "reading", name: "gauge.xml", bytes: 51_200, total: 102_400 } as const;
    render(<BoardFilePanel board={{ ...board, state }} busy={false} onList={vi.fn()} />);
    expect(screen.getByText("50 of 100 KB")).toBeDefined();
    await userEvent.setup().click(screen.getByRole("button", { name: /cancel/i }));
    expect(board.forget).toHaveBeenCalled();
  });

  it("says why a file is refused", () => {
    const message = "This file is empty. Export it again.";
    render(
      <BoardFilePanel
        board={{ ...board, state: { phase: "refused", name: "gauge.xml", message } }}
        busy={false}
        onList={vi.fn()}
      />,
    );
    expect(screen.getByRole("alert").textContent).toBe(`gauge.xml: ${message}`);
  });
});
