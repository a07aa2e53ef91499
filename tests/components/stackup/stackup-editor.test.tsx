// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { Tooltip } from "radix-ui";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { Toaster } from "@/components/ui/toast";
import { LengthUnitProvider } from "@/components/shell/length-unit";
import { StackupEditor } from "@/components/stackup/stackup-editor";
import type { LengthUnit } from "@/lib/client/preferences";
import type { StoredMaterial } from "@/lib/schemas/material";
import { type StackupDoc, stackupDoc, type StoredStackup } from "@/lib/schemas/stackup";
import { stackupTemplates } from "@/lib/si/stackup";
import { aMaterial } from "@/tests/support/documents";

const PROJECT = "0198f000-0000-7000-8000-000000000001";
const uuid = (index: number) => `0198f000-0000-7000-8000-1000000000${String(index).padStart(2, "0")}`;

function stored(copperLayers = 4): StoredStackup {
  const template = stackupTemplates.find((entry) => entry.copperLayers === copperLayers);
  const layers = (template?.layers ?? []).map((layer, index) => ({
    ...layer,
    id: uuid(index),
    lineageId: uuid(index + 50),
  }));
  return { name: "Tide gauge", version: 3, layers };
}

interface Put {
  version: number;
  stackup: StackupDoc;
}
let puts: Put[] = [];
/** What the server has. */
let present = stored();
/** The team's own. */
let materials: StoredMaterial[] = [];
/** Takes the page off the screen, as Back does. */
let leave: () => void;
let followed: string[] = [];
let refuse: ((put: Put) => Response | null) | null = null;

beforeAll(() => {
  Object.defineProperty(Element.prototype, "setPointerCapture", { value: () => undefined });
  Object.defineProperty(Element.prototype, "scrollIntoView", { value: () => undefined });
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
beforeEach(() => {
  puts = [];
  present = stored();
  materials = [];
  refuse = null;
  followed = [];
  sessionStorage.clear();
  vi.stubGlobal(
    "fetch",
    vi.fn(async (address: string, init?: RequestInit) => {
      if (init?.method === "PUT" && address.endsWith("/stackup")) {
        const put = JSON.parse(init.body as string) as Put;
        const refused = refuse?.(put);
        if (refused) return refused;
        stackupDoc.parse(put.stackup);
        puts.push(put);
        const layers = put.stackup.layers.map((layer, index) => ({
          ...layer,
          id: layer.id ?? uuid(index + 20),
          lineageId: layer.lineageId ?? uuid(index + 70),
        }));
        return Response.json({ name: put.stackup.name, version: put.version + 1, layers });
      }
      if (address.includes("/stackup")) return Response.json(present);
      if (address.endsWith("/materials")) return Response.json({ materials });
      return Response.json({ undo: null, redo: null });
    }),
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(stackup = stored(), readOnly: string | null = null, reader: LengthUnit = "mm") {
  const { unmount } = render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <LengthUnitProvider initial={reader}>
        <Tooltip.Provider>
          <Rail />
          <Toaster />
          <StackupEditor
            projectId={PROJECT}
            projectName="Tide gauge controller"
            revision="A"
            unit="mm"
            stackup={stackup}
            readOnly={readOnly}
          />
        </Tooltip.Provider>
      </LengthUnitProvider>
    </QueryClientProvider>,
  );
  leave = unmount;
  return userEvent.setup();
}

/** A link of the rail: followed unless something before it prevented the click. */
function Rail() {
  return (
    <a
      href={`/projects/${PROJECT}/impedance`}
      onClick={(event) => {
        if (!event.defaultPrevented) followed.push(event.currentTarget.pathname);
        event.preventDefault();
      }}
    >
      Impedance
    </a>
  );
}

const thickness = (put: Put | undefined) =>
  put?.stackup.layers.find(({ name }) => name === "Core 2-3")?.thickness;
const field = (name: string) => screen.getByRole<HTMLInputElement>("textbox", { name });
const combo = (name: string) => screen.getByRole<HTMLInputElement>("combobox", { name });
const order = () =>
  within(screen.getByRole("table", { name: "Layers, top to bottom" }))
    .getAllByRole<HTMLInputElement>("textbox", { name: /^Name of/ })
    .map((input) => input.value);
const overCopper = () => screen.getByText("Over copper").nextElementSibling?.textContent;

async function retype(user: ReturnType<typeof userEvent.setup>, input: HTMLInputElement, text: string) {
  await user.click(input);
  await user.clear(input);
  await user.type(input, text);
  await user.tab();
}

describe("stackup editor", () => {
  it("lets the total follow an edit at once and saves it a moment later with the version that was read", async () => {
    const user = show();
    const before = overCopper();
    await retype(user, field("Thickness of Core 2-3"), "1");
    expect(overCopper()).not.toBe(before);
    await waitFor(() => expect(puts).toHaveLength(1), { timeout: 3000 });
    expect(puts[0]?.version).toBe(3);
    expect(puts[0]?.stackup.layers.find(({ name }) => name === "Core 2-3")?.thickness).toEqual({
      value: "1",
      unit: "mm",
    });
    await waitFor(() => expect(screen.getByText("Saved")).toBeTruthy());
  });

  it("keeps a refused text when another layer is chosen, says which layer and why, and saves nothing", async () => {
    const user = show();
    await retype(user, field("Dk of Core 2-3"), "0.2");
    expect(field("Dk of Core 2-3").value).toBe("0.2");
    expect(screen.getByText("Core 2-3, Dk: Dk is at least 1 (air).")).toBeTruthy();
    expect(screen.getByRole("status").textContent).toContain("Not saved");
    await user.click(field("Name of L1 Top"));
    expect(field("Dk of Core 2-3").value).toBe("0.2");
    await retype(user, field("Dk of Core 2-3"), "4.5");
    await waitFor(() => expect(puts).toHaveLength(1), { timeout: 3000 });
    expect(puts[0]?.stackup.layers.find(({ name }) => name === "Core 2-3")?.dk).toBe("4.5");
  });

  it("saves what was typed before it follows a link", async () => {
    const user = show();
    await user.click(field("Thickness of Core 2-3"));
    await user.clear(field("Thickness of Core 2-3"));
    await user.type(field("Thickness of Core 2-3"), "1.1");
    await user.click(screen.getByRole("link", { name: "Impedance" }));
    await waitFor(() => expect(followed).toEqual([`/projects/${PROJECT}/impedance`]));
    expect(puts).toHaveLength(1);
    expect(thickness(puts[0])).toEqual({ value: "1.1", unit: "mm" });
  });

  it("saves an edit, and a text that is still being typed, when Back takes the page away", async () => {
    const user = show();
    await retype(user, field("Dk of Core 2-3"), "4.5");
    await user.click(field("Thickness of Core 2-3"));
    await user.clear(field("Thickness of Core 2-3"));
    await user.type(field("Thickness of Core 2-3"), "1.2");
    leave();
    await waitFor(() => expect(thickness(puts.at(-1))).toEqual({ value: "1.2", unit: "mm" }));
    expect(puts.at(-1)?.stackup.layers.find(({ name }) => name === "Core 2-3")?.dk).toBe("4.5");
  });

  it("stays where a text could not be read, and leaves without it only when told to", async () => {
    const user = show();
    await retype(user, field("Dk of Core 2-3"), "0.2");
    await retype(user, field("Thickness of Core 2-3"), "1.3");
    await user.click(screen.getByRole("link", { name: "Impedance" }));
    expect(await screen.findByText(/^Not saved yet\. Core 2-3, Dk/)).toBeTruthy();
    expect(followed).toEqual([]);
    await user.click(screen.getByRole("button", { name: "Leave without it" }));
    await waitFor(() => expect(followed).toHaveLength(1));
    expect(thickness(puts[0])).toEqual({ value: "1.3", unit: "mm" });
  });

  it("keeps a refused text over Back and coming back", async () => {
    const user = show();
    await retype(user, field("Dk of Core 2-3"), "0.2");
    await retype(user, field("Thickness of Core 2-3"), "1.4");
    leave();
    show();
    await waitFor(() => expect(field("Dk of Core 2-3").value).toBe("0.2"));
    expect(puts).toHaveLength(0);
    await retype(user, field("Dk of Core 2-3"), "4.4");
    await waitFor(() => expect(puts).toHaveLength(1), { timeout: 3000 });
    expect(thickness(puts[0])).toEqual({ value: "1.4", unit: "mm" });
  });

  it("reads a bare number in the unit that the field shows, also while one types", async () => {
    const user = show(stored(), null, "mil");
    const thick = field("Thickness of Core 2-3");
    expect(thick.value).toMatch(/ mil$/);
    await user.click(thick);
    expect(thick.value).toMatch(/ mil$/);
    await retype(user, thick, "8");
    expect(thick.value).toBe("8 mil");
    await waitFor(() => expect(thickness(puts[0])).toEqual({ value: "8", unit: "mil" }), { timeout: 3000 });
    expect(screen.getByText(/Lengths without a unit are read as mil/)).toBeTruthy();
  });

  it("leaves a length as it was typed where it was only looked at in another unit", async () => {
    const user = show(stored(), null, "mil");
    await user.click(field("Thickness of Core 2-3"));
    await user.tab();
    await retype(user, field("Dk of Core 2-3"), "4.5");
    await waitFor(() => expect(puts).toHaveLength(1), { timeout: 3000 });
    expect(thickness(puts[0])).toEqual(stored().layers.find(({ name }) => name === "Core 2-3")?.thickness);
  });

  it("does not save two layers of one name, and says which", async () => {
    const user = show();
    await retype(user, field("Name of L2 GND"), "L1 Top");
    expect(screen.getByText(/both named "L1 Top"/)).toBeTruthy();
    expect(screen.getByRole("status").textContent).toContain("Not saved");
    expect(puts).toHaveLength(0);
  });

  it("moves a layer with Alt and an arrow, and the focus with it", async () => {
    const user = show();
    const [first, second] = order();
    await user.click(field(`Name of ${first}`));
    await user.keyboard("{Alt>}{ArrowDown}{/Alt}");
    expect(order().slice(0, 2)).toEqual([second, first]);
    await waitFor(() => expect(document.activeElement).toBe(field(`Name of ${first}`)));
  });

  it("says on a conflict what was changed, and saves over it only when told to", async () => {
    const user = show();
    const current = { ...stored(), version: 9, name: "Theirs" };
    refuse = (put) =>
      put.version === 9
        ? null
        : Response.json(
            {
              error: {
                code: "conflict",
                message: "The stackup was changed by Ines.",
                current,
                changed: Array.from({ length: 6 }, (_, at) => `L${at + 1} etch`),
              },
            },
            { status: 409 },
          );
    await retype(user, field("Thickness of Core 2-3"), "0.9");
    await waitFor(() => expect(screen.getByText("The stackup was changed by Ines.")).toBeTruthy(), {
      timeout: 3000,
    });
    expect(screen.getByText("L6 etch")).toBeTruthy();
    expect(field("Thickness of Core 2-3").value).toBe("0.9 mm");
    await user.click(screen.getByRole("button", { name: "Keep mine" }));
    await waitFor(() => expect(puts).toHaveLength(1));
    expect(puts[0]?.version).toBe(9);
  });

  it("takes what was saved since the page was left, as nothing is under edit", async () => {
    present = { ...stored(6), version: 8, name: "Six layers" };
    show();
    await waitFor(() => expect(order()).toHaveLength(13));
    expect(field("Name of the stackup").value).toBe("Six layers");
  });

  it("presses a prepreg from its plies, exactly", async () => {
    const user = show();
    await user.click(field("Name of Prepreg 1-2"));
    await retype(user, combo("Glass style of ply 1"), "2116");
    // 120 µm − 34.3 µm × (1 − 0.8): the inner plane of 1 oz sinks in, computed.
    const details = screen.getByRole("region", { name: "Layer Prepreg 1-2" });
    expect(within(details).getByText("0.11314 mm")).toBeTruthy();
  });

  it("fills a layer in from the team's own material, offered before the generic ones, with its source", async () => {
    materials = [
      {
        ...aMaterial("Estuary core", { thickness: { value: "0.3", unit: "mm" } }),
        id: uuid(90),
        version: 0,
        createdAt: 0,
        updatedAt: 0,
        createdByName: null,
      },
    ];
    const user = show();
    await user.click(field("Name of Core 2-3"));
    await user.click(screen.getByRole("button", { name: "Fill in a material" }));
    const own = await screen.findByRole("menuitem", { name: /^Estuary core/ });
    expect(screen.getAllByRole("menuitem")[0]).toBe(own);
    expect(screen.getByRole("menuitem", { name: /^Modified epoxy, mid loss/ })).toBeTruthy();
    await user.click(own);
    expect(field("Dk of Core 2-3").value).toBe("3.62");
    expect(field("Source note").value).toBe("Data sheet of the invented maker, table 2");
    await waitFor(() => expect(puts).toHaveLength(1), { timeout: 3000 });
    expect(puts[0]?.stackup.layers.find(({ name }) => name === "Core 2-3")).toMatchObject({
      material: "Estuary core",
      dk: "3.62",
      df: "0.0041",
      dkFrequency: { value: "10", unit: "GHz" },
      thickness: { value: "0.3", unit: "mm" },
      origin: "data sheet",
      sourceNote: "Data sheet of the invented maker, table 2",
    });
  });

  it("shows a released stackup without anything to edit", () => {
    show(stored(), "Revision A is released and stays as it is.");
    expect(screen.queryAllByRole("textbox")).toHaveLength(0);
    expect(screen.queryByRole("button", { name: "Templates" })).toBeNull();
    expect(screen.getByText("Revision A is released and stays as it is.")).toBeTruthy();
  });

  it("replaces the layers by a template only after saying what is replaced", async () => {
    const user = show();
    await user.click(screen.getByRole("button", { name: "Templates" }));
    const dialog = await screen.findByRole("dialog");
    expect(within(dialog).getByText(/replaces the 9 layers of “Tide gauge”/)).toBeTruthy();
    await user.click(within(dialog).getByRole("radio", { name: /^6 layers/ }));
    await user.click(within(dialog).getByRole("button", { name: "Replace 9 layers by 13" }));
    expect(order()).toHaveLength(13);
  });

  it("takes the good rows of a list only after confirming, and names the bad ones", async () => {
    const user = show();
    await user.click(screen.getByRole("button", { name: "Import" }));
    const dialog = await screen.findByRole("dialog");
    await user.click(within(dialog).getByRole("textbox", { name: "Or paste from a spreadsheet" }));
    await user.paste(
      "kind\tname\tthickness\tDk\tbase foil\nsignal\tTop\t\t\t1/2 oz\ncore\tC1\t12..7\t4.2\t\nplane\tGnd\t\t\t1 oz\n",
    );
    expect(within(dialog).getByText(/'12\.\.7' is not a length/)).toBeTruthy();
    await user.click(within(dialog).getByRole("button", { name: "Take the 2 good rows, leave out 1" }));
    expect(order()).toEqual(["Top", "Gnd"]);
  });
});
