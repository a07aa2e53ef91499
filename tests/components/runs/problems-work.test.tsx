// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { NuqsTestingAdapter, type OnUrlUpdateFunction } from "nuqs/adapters/testing";
import { Tooltip } from "radix-ui";
import type { ReactNode } from "react";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { ProblemsWork } from "@/components/runs/problems-work";
import { rightsOf } from "@/components/runs/rights";
import { packRows } from "@/lib/schemas/problem-list";
import { aProblem } from "../../support/problems";

const push = vi.fn();
vi.mock("next/navigation", () => ({ useRouter: () => ({ push }) }));

const PATHS = "/api/v1/projects/P";
const posts: { url: string; body: unknown }[] = [];
let problems = [aProblem("a", { path: "SD_CLK" }), aProblem("b", { path: "SD_D1", share: -0.1 })];
let refusal: { status: number; message: string; code: string } | null = null;

function answer(url: string): unknown {
  if (url.endsWith("/problems")) return packRows(problems);
  if (url.endsWith("/flags")) return { flags: [] };
  if (url.includes("/waivers")) return { waivers: [] };
  if (url.endsWith("/no-data")) return { missing: [], accepted: [] };
  if (url.endsWith("/assignees")) return { people: [{ userId: "u", name: "Tove Lund", role: "reviewer" }] };
  if (url.includes("/findings")) return { findings: [] };
  throw new Error(`Nobody answers ${url}`);
}

beforeAll(() => {
  Object.defineProperty(Element.prototype, "scrollIntoView", { value: () => undefined });
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
beforeEach(() => {
  posts.length = 0;
  push.mockClear();
  refusal = null;
  problems = [aProblem("a", { path: "SD_CLK" }), aProblem("b", { path: "SD_D1", share: -0.1 })];
  vi.stubGlobal("fetch", (url: string, init?: RequestInit) => {
    if (init?.method && init.method !== "GET") {
      posts.push({ url, body: JSON.parse(init.body as string) });
      return Promise.resolve(
        refusal
          ? Response.json({ error: refusal }, { status: refusal.status })
          : Response.json({ id: "made" }, { status: 201 }),
      );
    }
    return Promise.resolve(Response.json(answer(url)));
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(role: "reviewer" | "designer", search = "", onUrlUpdate?: OnUrlUpdateFunction) {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  const wrap = ({ children }: { children: ReactNode }) => (
    <NuqsTestingAdapter searchParams={search} onUrlUpdate={onUrlUpdate} hasMemory>
      <QueryClientProvider client={client}>
        <Tooltip.Provider>{children}</Tooltip.Provider>
      </QueryClientProvider>
    </NuqsTestingAdapter>
  );
  return render(<ProblemsWork projectId="P" runId="R" rights={rightsOf({ userId: "me", role })} />, {
    wrapper: wrap,
  });
}
const table = () => screen.findByRole("table", { name: "Problems, worst first" });

describe("the table of problems", () => {
  it("says worst corner, share of corners and whether the nominal one fails", async () => {
    show("reviewer");
    const row = within(await table()).getAllByRole("row")[1];
    expect(row?.textContent).toContain("SD_CLK");
    expect(row?.textContent).toContain("3 of 9, at nominal");
    expect(row?.textContent).toContain("fast/high");
  });

  it("j chooses, Enter opens the net of the run, f flags, x selects: by keyboard alone", async () => {
    const user = userEvent.setup();
    show("reviewer");
    await table();
    await user.keyboard("j");
    await screen.findByRole("complementary", { name: "SD_CLK" });
    await user.keyboard("{Enter}");
    expect(push).toHaveBeenCalledWith("/projects/P/nets/a?run=R");
    await user.keyboard("x");
    expect(await screen.findByText("1 problem selected")).toBeDefined();
    await user.keyboard("jx");
    expect(await screen.findByText("2 problems selected")).toBeDefined();
    await user.keyboard("f");
    const dialog = await screen.findByRole("dialog", { name: "Flag 2 problems" });
    await user.type(within(dialog).getByLabelText("Comment"), "Please look");
    await user.click(within(dialog).getByRole("button", { name: "Flag" }));
    await waitFor(() => expect(posts).toHaveLength(2));
    expect(posts[0]).toEqual({
      url: `${PATHS}/flags`,
      body: {
        subject: { kind: "problem", lineageId: "a", mechanism: "driver mismatch" },
        comment: "Please look",
        assigneeUserId: null,
      },
    });
  });

  it("keeps filters in the address and takes them from it", async () => {
    const seen = vi.fn<OnUrlUpdateFunction>();
    const user = userEvent.setup();
    show("reviewer", "?q=clk", seen);
    expect(within(await table()).getAllByRole("row")).toHaveLength(2);
    await user.selectOptions(screen.getByLabelText("Verdict"), "fail");
    await waitFor(() => expect(seen.mock.calls.at(-1)?.[0].queryString).toContain("verdict=fail"));
  });

  it("has a waiver say why and until when, and shows the server's refusal in its words", async () => {
    const user = userEvent.setup();
    refusal = {
      status: 422,
      code: "editor",
      message: "You edited this draft, so another reviewer must waive it.",
    };
    show("reviewer", "?at=a%20driver%20mismatch");
    await table();
    await user.keyboard("w");
    const dialog = await screen.findByRole("dialog", { name: "Waive SD_CLK" });
    await user.click(within(dialog).getByRole("button", { name: "Waive" }));
    expect(within(dialog).getByText("Give the reason in a sentence.")).toBeDefined();
    expect(posts).toHaveLength(0);
    await user.type(within(dialog).getByLabelText("Reason"), "Measured on the first boards.");
    await user.click(within(dialog).getByRole("button", { name: "Waive" }));
    expect(await within(dialog).findByText(refusal.message)).toBeDefined();
  });

  it("offers a designer no waiver, and says whose it is when asked by key", async () => {
    const user = userEvent.setup();
    show("designer", "?at=a%20driver%20mismatch");
    await table();
    expect(screen.queryByRole("button", { name: "Waive" })).toBeNull();
    await user.keyboard("w");
    expect(screen.queryByRole("dialog")).toBeNull();
  });

  it("holds few of ten thousand rows in the page", async () => {
    problems = Array.from({ length: 10_000 }, (_, index) => aProblem(`p${index}`));
    show("reviewer");
    expect(within(await table()).getAllByRole("row").length).toBeLessThan(80);
    expect(JSON.stringify(packRows(problems)).length).toBeLessThan(2_000_000);
  });
});
