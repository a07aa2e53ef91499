// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { VerdictCounts } from "@/components/overview/verdict-counts";
import type { OverviewRun } from "@/lib/schemas/project-overview";

afterEach(cleanup);

function show(counts: Record<string, number>) {
  const run: OverviewRun = {
    id: "run",
    number: 2,
    state: "done",
    done: 356,
    total: 356,
    finishedAt: null,
    counts,
    current: true,
  };
  render(<VerdictCounts run={run} waived={0} base="/projects/board" />);
}

describe("the overview's count", () => {
  it("says of how many paths some were judged: what has no data was not", () => {
    show({ pass: 30, fail: 4, "no data": 322 });
    expect(screen.getByText(/judged 34 of 356 signal paths/)).toBeTruthy();
  });

  it("says it plainly where all were", () => {
    show({ pass: 30, fail: 4 });
    expect(screen.getByText(/judged 34 signal paths/)).toBeTruthy();
  });
});
