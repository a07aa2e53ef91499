// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { NuqsTestingAdapter, type OnUrlUpdateFunction } from "nuqs/adapters/testing";
import { Tooltip } from "radix-ui";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { ImpedanceView } from "@/components/impedance/impedance-view";
import { LengthUnitProvider } from "@/components/shell/length-unit";
import type { StoredStackup } from "@/lib/schemas/stackup";
import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import { directEngine } from "../../support/direct-engine";
import { aBoard, aClassOn, LIMITS } from "../../support/impedance-page";

const CLASSES = [
  aClassOn("Bus", { L1: ["0.2", null], L4: ["0.3", null] }),
  aClassOn(
    "Link",
    { L1: ["0.15", "0.15"] },
    { kind: "differential", targetImpedance: { value: "100", unit: "Ω" } },
  ),
];

/** How often the page's own undo was asked for. */
let undone = 0;
let puts: { version: number; netClass: NetClassDoc }[] = [];
let address = new URLSearchParams();
/** What the server has. */
let served: { stackup: StoredStackup; classes: StoredNetClass[] } = {
  stackup: aBoard().stackup,
  classes: CLASSES,
};

beforeAll(() => {
  Object.defineProperty(Element.prototype, "scrollIntoView", { value: () => undefined });
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
beforeEach(() => {
  vi.stubGlobal("matchMedia", () => ({ matches: true }));
  puts = [];
  undone = 0;
  address = new URLSearchParams();
  vi.stubGlobal(
    "fetch",
    vi.fn(async (path: string, init?: RequestInit) => {
      if (init?.method === "POST") undone++;
      if (init?.method !== "PUT") {
        if (path.includes("/stackup")) return Response.json(served.stackup);
        return Response.json(
          path.includes("/classes") ? { classes: served.classes } : { undo: null, redo: null },
        );
      }
      const put = JSON.parse(init.body as string) as (typeof puts)[number];
      puts.push(put);
      const present = CLASSES.find(({ id }) => path.endsWith(id));
      return Response.json({ ...present, ...put.netClass, version: put.version + 1 });
    }),
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(
  over: { classes?: StoredNetClass[]; empty?: boolean; readOnly?: string | null; search?: string } = {},
) {
  const { classes = CLASSES, empty = false, readOnly = null, search = "" } = over;
  const board = aBoard().stackup;
  const stackup = empty ? { ...board, layers: [] } : board;
  served = { stackup, classes };
  const onUrlUpdate: OnUrlUpdateFunction = ({ searchParams }) => {
    address = searchParams;
  };
  render(
    <QueryClientProvider
      client={new QueryClient({ defaultOptions: { queries: { retry: false, staleTime: Infinity } } })}
    >
      <NuqsTestingAdapter hasMemory searchParams={search} onUrlUpdate={onUrlUpdate}>
        <LengthUnitProvider initial="mm">
          <Tooltip.Provider>
            <ImpedanceView
              projectId="0198f000-0000-7000-8000-000000000001"
              projectName="Tide gauge controller"
              revision="A"
              stackup={stackup}
              classes={classes}
              limits={Object.fromEntries(classes.map(({ lineageId }) => [lineageId, LIMITS]))}
              readOnly={readOnly}
              search=""
              engines={{ live: directEngine, background: directEngine }}
            />
          </Tooltip.Provider>
        </LengthUnitProvider>
      </NuqsTestingAdapter>
    </QueryClientProvider>,
  );
  return userEvent.setup();
}

const panel = () => screen.queryByRole("complementary");

describe("impedance page", () => {
  it("goes through the rows by j and k, opens with Enter, follows the keyboard, closes with Escape", async () => {
    const user = show();
    await user.keyboard("j{Enter}");
    await waitFor(() => expect(panel()?.textContent).toContain("Bus on L1"));
    expect(address.get("cell")).toBe(`${CLASSES[0]?.lineageId}.${CLASSES[0]?.layers[0]?.layerLineageId}`);
    await user.keyboard("j");
    await waitFor(() => expect(panel()?.textContent).toContain("Bus on L4"));
    await user.keyboard("{Escape}");
    await waitFor(() => expect(panel()).toBeNull());
    expect(address.get("cell")).toBeNull();
  });

  it("recalculates at once when a width is typed, and writes it into the class when told to", async () => {
    const user = show();
    await user.keyboard("j{Enter}");
    await waitFor(() => expect(panel()).not.toBeNull());
    const width = screen.getByRole<HTMLInputElement>("textbox", { name: "Foot width, as a number" });
    const before = panel()?.querySelector("[aria-live]")?.textContent;
    await user.click(width);
    await user.clear(width);
    await user.type(width, "10 mil{Enter}");
    expect(panel()?.querySelector("[aria-live]")?.textContent).not.toBe(before);
    await user.click(screen.getByRole("button", { name: "Use in class" }));
    await waitFor(() => expect(puts).toHaveLength(1));
    expect(puts[0]?.version).toBe(1);
    expect(puts[0]?.netClass.layers[0]?.width).toEqual({ value: "0.254", unit: "mm" });
    expect(puts[0]?.netClass.layers[1]).toEqual(CLASSES[0]?.layers[1]);
  });

  it("takes unit, grid and filter from the address", () => {
    const bus = CLASSES[0]?.lineageId ?? "";
    show({ search: `?unit=mil&grid=0.5+mil&class=${bus}&layers=all` });
    const table = screen.getByRole("table", { name: "Impedance by class and layer" });
    const rows = within(table).getAllByRole("row").slice(1);
    expect(rows).toHaveLength(2);
    // 0.2 mm is 7.874 mil, computed
    expect(rows[0]?.textContent).toContain("7.874");
    expect(rows[0]?.textContent).toContain("mil");
  });

  it("undoes trials by Ctrl+Z in the panel, one step a slider or number, and resets them", async () => {
    const user = show();
    await user.keyboard("j{Enter}");
    await waitFor(() => expect(panel()).not.toBeNull());
    const height = await screen.findByRole<HTMLInputElement>("textbox", {
      name: "Height below, as a number",
    });
    const own = height.value;
    await user.click(height);
    await user.clear(height);
    await user.type(height, "0.3{Enter}");
    expect(address.get("below")).toBe("300");
    expect(panel()?.textContent).toContain("Heights, Dk and mask are only tried here");
    const slider = screen.getByRole<HTMLInputElement>("slider", { name: "Foot width" });
    fireEvent.input(slider, { target: { value: "60" } });
    fireEvent.input(slider, { target: { value: "61" } });
    fireEvent(slider, new Event("change", { bubbles: true }));
    // 61 steps of 5 µm
    await waitFor(() => expect(address.get("width")).toBe("305"));
    slider.focus();
    await user.keyboard("{Control>}z{/Control}");
    await waitFor(() => expect(address.get("width")).toBeNull());
    expect(address.get("below")).toBe("300");
    await user.keyboard("{Control>}z{/Control}");
    await waitFor(() => expect(address.get("below")).toBeNull());
    expect(height.value).toBe(own);
    await user.click(screen.getByRole("button", { name: "Redo trial" }));
    await waitFor(() => expect(address.get("below")).toBe("300"));
    await user.click(screen.getByRole("button", { name: "Reset" }));
    await waitFor(() => expect(address.get("below")).toBeNull());
    expect(undone).toBe(0);
  });

  it("restores row, width, heights, Dk and mask from the address", async () => {
    const [bus] = CLASSES;
    const cell = `${bus?.lineageId}.${bus?.layers[0]?.layerLineageId}`;
    show({ search: `?cell=${cell}&width=250&below=150&dkBelow=3.6&mask=12` });
    const value = async (name: string) =>
      (await screen.findByRole<HTMLInputElement>("textbox", { name: `${name}, as a number` })).value;
    expect(await value("Foot width")).toBe("0.25 mm");
    expect(await value("Height below")).toBe("0.15 mm");
    expect(await value("Dk below")).toBe("3.6");
    expect(await value("Mask over copper")).toBe("0.012 mm");
    await waitFor(() =>
      expect(panel()?.querySelector("desc")?.textContent).toContain("height below 0.150\u2009mm"),
    );
  });

  it("forgets what was tried with the row it was tried on", async () => {
    const user = show();
    await user.keyboard("j{Enter}");
    await waitFor(() => expect(panel()).not.toBeNull());
    const width = screen.getByRole<HTMLInputElement>("textbox", { name: "Foot width, as a number" });
    await user.click(width);
    await user.clear(width);
    await user.type(width, "0.4{Enter}");
    expect(address.get("width")).toBe("400");
    await user.tab();
    (document.activeElement as HTMLElement).blur();
    await user.keyboard("j");
    await waitFor(() => expect(panel()?.textContent).toContain("Bus on L4"));
    expect(address.get("width")).toBeNull();
  });

  it("lets a reviewer try widths without a button that writes them", async () => {
    const user = show({ readOnly: "Designers write widths into the classes." });
    await user.keyboard("j{Enter}");
    await waitFor(() => expect(panel()).not.toBeNull());
    expect(screen.queryByRole("button", { name: "Use in class" })).toBeNull();
  });

  it("says what to do where there is no stackup, no class, or no target", () => {
    show({ empty: true });
    expect(screen.getByRole("link", { name: "Go to the stackup" }).getAttribute("href")).toMatch(
      /\/stackup$/,
    );
    cleanup();
    show({ classes: [] });
    expect(screen.getByRole("heading", { name: "No classes yet" })).toBeTruthy();
    cleanup();
    show({ classes: [aClassOn("Slow", {}, { targetImpedance: null })] });
    expect(screen.getByRole("heading", { name: "No class has a target impedance" })).toBeTruthy();
  });
});
