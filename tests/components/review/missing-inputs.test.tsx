// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { MissingInputs } from "@/components/review/missing-inputs";

let posts: unknown[] = [];

beforeAll(() => {
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
beforeEach(() => {
  posts = [];
  const missing = [
    ...["A", "B", "C"].map((net) => ({ missing: `route of ${net}`, paths: 2, kind: "Route in islands" })),
    { missing: "driver model of U1", paths: 4, kind: "Driver model" },
  ];
  vi.stubGlobal(
    "fetch",
    vi.fn(async (_address: string, init?: RequestInit) => {
      if (init?.method !== "POST") return Response.json({ missing, accepted: [] });
      posts.push(JSON.parse(init.body as string));
      return Response.json({ ids: [] }, { status: 201 });
    }),
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

describe("missing inputs", () => {
  it("are narrowed to a kind and accepted together with one reason", async () => {
    const user = userEvent.setup();
    render(
      <QueryClientProvider client={new QueryClient()}>
        <MissingInputs
          projectId="P"
          runId="R"
          rights={{ userId: "u", flag: true, waive: true } as never}
          frozen={false}
        />
      </QueryClientProvider>,
    );
    const table = await screen.findByRole("table", { name: "Missing inputs" });
    expect(within(table).getAllByRole("row")).toHaveLength(5);
    await user.selectOptions(screen.getByRole("combobox", { name: "Kind" }), "Route in islands");
    expect(within(table).getAllByRole("row")).toHaveLength(4);
    await user.click(within(table).getByRole("checkbox", { name: "Tick all rows" }));
    await user.click(screen.getByRole("button", { name: "Accept 3 inputs with one reason" }));
    expect(screen.getByText(/^6 paths stay without a verdict/)).toBeTruthy();
    await user.type(screen.getByLabelText("Reason"), "Spares that are not fitted.");
    await user.click(screen.getByRole("button", { name: "Accept" }));
    await waitFor(() =>
      expect(posts).toEqual([
        { missing: ["route of A", "route of B", "route of C"], reason: "Spares that are not fitted." },
      ]),
    );
  });
});
