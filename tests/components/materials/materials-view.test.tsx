// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { NuqsTestingAdapter } from "nuqs/adapters/testing";
import { Tooltip } from "radix-ui";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { MaterialsView } from "@/components/materials/materials-view";
import { LengthUnitProvider } from "@/components/shell/length-unit";
import type { MaterialDoc, StoredMaterial } from "@/lib/schemas/material";
import { aMaterial } from "@/tests/support/documents";

const uuid = (index: number) => `0198f000-0000-7000-8000-1000000000${String(index).padStart(2, "0")}`;
const stored = (index: number, doc: MaterialDoc, version = 0): StoredMaterial => ({
  ...doc,
  id: uuid(index),
  version,
  createdAt: 0,
  updatedAt: 0,
  createdByName: "Dana",
});

/** What the server has. */
let present: StoredMaterial[] = [];
let writes: { method: string; body: { version?: number; material?: MaterialDoc } }[] = [];
let refuse: (() => Response) | null = null;

beforeAll(() => {
  Object.defineProperty(Element.prototype, "scrollIntoView", { value: () => undefined });
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
beforeEach(() => {
  present = [stored(1, aMaterial("Estuary core"))];
  writes = [];
  refuse = null;
  vi.stubGlobal(
    "fetch",
    vi.fn(async (_address: string, init?: RequestInit) => {
      const method = init?.method ?? "GET";
      if (method === "GET") return Response.json({ materials: present });
      const refused = refuse?.();
      refuse = null;
      if (refused) return refused;
      const body = JSON.parse((init?.body as string | undefined) ?? "{}") as (typeof writes)[number]["body"];
      writes.push({ method, body });
      if (method === "DELETE") {
        present = [];
        return new Response(null, { status: 204 });
      }
      const saved = stored(
        method === "POST" ? 2 : 1,
        body.material ?? aMaterial("?"),
        (body.version ?? -1) + 1,
      );
      present = [...present.filter(({ id }) => id !== saved.id), saved];
      return Response.json(saved);
    }),
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(mayEdit = true, searchParams = "") {
  render(
    <NuqsTestingAdapter searchParams={searchParams} hasMemory>
      <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
        <LengthUnitProvider initial="mm">
          <Tooltip.Provider>
            <MaterialsView initial={present} mayEdit={mayEdit} />
          </Tooltip.Provider>
        </LengthUnitProvider>
      </QueryClientProvider>
    </NuqsTestingAdapter>,
  );
  return userEvent.setup();
}

const table = () => within(screen.getByRole("table", { name: "Materials" }));
const dialog = () => within(screen.getByRole("dialog"));

describe("the page of materials", () => {
  it("shows the team's own before the generic ones, and filters by what the address says", async () => {
    const user = show(true, "?kind=mask");
    expect(table().getAllByRole("row")).toHaveLength(3);
    await user.click(screen.getByRole("button", { name: "Show all" }));
    await waitFor(() => expect(table().getAllByRole("row").length).toBeGreaterThan(50));
    expect(table().getAllByRole("row")[1]?.textContent).toContain("Estuary core");
    expect(table().getAllByRole("row")[1]?.textContent).toContain("team");
  });

  it("adds a prepreg whose Dk, Df and thickness are computed from glass and resin, with that as its source", async () => {
    const user = show();
    await user.click(screen.getByRole("button", { name: "Add a material" }));
    await user.type(dialog().getByRole("textbox", { name: "Name" }), "Estuary ply");
    await user.selectOptions(dialog().getByRole("combobox", { name: "Kind" }), "prepreg");
    await user.type(dialog().getByRole("combobox", { name: "Glass style" }), "1080");
    await user.type(dialog().getByRole("textbox", { name: "Resin content" }), "65");
    await user.selectOptions(dialog().getByRole("combobox", { name: "Resin of" }), "low-loss");
    await user.click(dialog().getByRole("button", { name: "Compute Dk and Df" }));
    expect(dialog().getByRole("status").textContent).toBe("Filled in from 1080 with 65 % resin.");
    await user.click(dialog().getByRole("button", { name: "Add" }));
    await waitFor(() => expect(writes).toHaveLength(1));
    const made = writes[0]?.body.material;
    expect(made).toMatchObject({
      name: "Estuary ply",
      kind: "prepreg",
      glassStyle: "1080",
      resinPercent: "65",
      frequency: { value: "10", unit: "GHz" },
      thickness: { value: "81", unit: "µm" },
      origin: "assumed",
    });
    expect(Number(made?.dk)).toBeGreaterThan(3.3);
    expect(Number(made?.dk)).toBeLessThan(3.7);
    expect(made?.source).toMatch(/mixing rule/);
    await waitFor(() => expect(table().getByText("Estuary ply")).toBeTruthy());
  });

  it("says in the fields what is wrong, and sends nothing", async () => {
    const user = show();
    await user.click(screen.getByRole("button", { name: "Add a material" }));
    await user.click(dialog().getByRole("button", { name: "Add" }));
    expect(await dialog().findByText("A laminate needs a Dk.")).toBeTruthy();
    expect(dialog().getByText("Give it a name.")).toBeTruthy();
    expect(writes).toEqual([]);
  });

  it("tells of another's change, and saves over it only when told to", async () => {
    const user = show();
    await user.click(screen.getByRole("button", { name: "Acts on Estuary core" }));
    await user.click(await screen.findByRole("menuitem", { name: "Edit" }));
    const dk = dialog().getByRole("textbox", { name: "Dk" });
    await user.clear(dk);
    await user.type(dk, "3.9");
    refuse = () =>
      Response.json(
        {
          error: {
            code: "conflict",
            message:
              "Estuary core was changed after you opened it. Take the present one, or save yours over it.",
            current: stored(1, aMaterial("Estuary core", { df: "0.009" }), 4),
            changed: ["dk", "df"],
          },
        },
        { status: 409 },
      );
    await user.click(dialog().getByRole("button", { name: "Save" }));
    expect((await dialog().findByRole("alert")).textContent).toContain("It differs in Dk, Df.");
    expect(dialog().getByRole("button", { name: "Take the present one" })).toBeTruthy();
    await user.click(dialog().getByRole("button", { name: "Save mine over it" }));
    await waitFor(() => expect(writes).toHaveLength(1));
    expect(writes[0]).toMatchObject({ method: "PUT", body: { version: 4, material: { dk: "3.9" } } });
  });

  it("copies a generic one into the team's own; a reviewer only reads", async () => {
    const user = show(true, "?q=dry+film");
    await user.click(screen.getByRole("button", { name: "Acts on Solder mask, dry film" }));
    await user.click(await screen.findByRole("menuitem", { name: "Copy into the team’s own" }));
    await user.click(dialog().getByRole("button", { name: "Add" }));
    await waitFor(() => expect(writes[0]?.body.material).toMatchObject({ kind: "mask", dk: "3.6" }));
    cleanup();
    show(false);
    expect(screen.queryByRole("button", { name: "Add a material" })).toBeNull();
    expect(screen.queryByRole("button", { name: /^Acts on/ })).toBeNull();
    expect(screen.getByRole("button", { name: "Copy as CSV" })).toBeTruthy();
  });

  it("removes one at the version that was read", async () => {
    const user = show();
    await user.click(screen.getByRole("button", { name: "Acts on Estuary core" }));
    await user.click(await screen.findByRole("menuitem", { name: "Remove" }));
    await waitFor(() => expect(writes).toEqual([{ method: "DELETE", body: { version: 0 } }]));
    await waitFor(() => expect(table().queryByText("Estuary core")).toBeNull());
  });
});
