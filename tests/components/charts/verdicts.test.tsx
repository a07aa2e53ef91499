// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { VerdictBar } from "@/components/charts/verdict-bar";
import { RunHead } from "@/components/runs/run-head";
import { VerdictMark } from "@/components/ui/verdict-mark";
import type { RunView } from "@/lib/client/runs";
import { SHOWN_VERDICTS } from "@/lib/drawings/verdict-mark";

const size = { parentRef: { current: null }, width: 0, height: 0 };
vi.mock("@visx/responsive", () => ({ useParentSize: () => size }));

afterEach(cleanup);

describe("VerdictMark", () => {
  it("never shows a shape without its word", () => {
    for (const verdict of SHOWN_VERDICTS) {
      render(<VerdictMark verdict={verdict} />);
      expect(screen.getByText(verdict)).toBeTruthy();
    }
  });

  it("has the shape that the drawings have for the same verdict", () => {
    for (const verdict of SHOWN_VERDICTS) {
      const mark = render(<VerdictMark verdict={verdict} />).container;
      const bar = render(<VerdictBar width={300} counts={{ [verdict]: 1 }} />).container;
      const shapes = [...mark.querySelectorAll("svg > :not(defs)")].map(({ tagName }) => tagName);
      const drawn = [...bar.querySelectorAll("svg *")].map(({ tagName }) => tagName).join(" ");
      expect(shapes.length).toBeGreaterThan(0);
      expect(drawn).toContain(shapes.join(" "));
    }
  });
});

describe("the verdicts of a run", () => {
  it("reach over the whole sheet", () => {
    size.width = 1380;
    const run = { state: "done", counts: { pass: 3 }, id: "R", number: 1 } as unknown as RunView;
    render(
      <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { enabled: false } } })}>
        <RunHead projectId="P" run={run} listed={undefined} draft={undefined} onVerdict={() => undefined} />
      </QueryClientProvider>,
    );
    expect(screen.getByRole("img", { name: /^Paths by verdict/ }).getAttribute("width")).toBe("1380");
  });
});
