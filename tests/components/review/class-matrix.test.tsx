// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { ClassMatrix } from "@/components/review/class-matrix";

afterEach(cleanup);

const cell = (className: string | null, rule: string, fail: number, over = {}) => ({
  className,
  rule,
  fail,
  near: 0,
  noData: 0,
  worstMargin: fail > 0 ? -0.25 : null,
  unit: "V",
  ...over,
});

describe("class by rule", () => {
  it("puts the class with most failures first and links each cell to its problems", () => {
    render(
      <ClassMatrix
        projectId="P"
        runId="R"
        cells={[
          cell("Data", "above-rail", 1),
          cell("Clock", "above-rail", 3, { near: 2, noData: 1 }),
          cell(null, "ringback", 0, { noData: 4, unit: "mV" }),
        ]}
      />,
    );
    expect(screen.getAllByRole("rowheader").map((head) => head.textContent)).toEqual([
      "Clock",
      "Data",
      "no class",
    ]);
    const link = screen.getByRole("link", {
      name: "Clock, Above rail: 3 failing, 2 near, 1 no data, worst margin −0.250\u2009V",
    });
    expect(link.getAttribute("href")).toBe("/projects/P/runs/R?class=Clock&rule=above-rail");
  });
  it("says so where nothing is to be reported", () => {
    render(<ClassMatrix projectId="P" runId="R" cells={[]} />);
    expect(screen.getByText(/every path in scope passes/)).toBeDefined();
  });
});
