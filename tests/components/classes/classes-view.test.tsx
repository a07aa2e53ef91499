// @vitest-environment jsdom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { cleanup, render, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { NuqsTestingAdapter } from "nuqs/adapters/testing";
import { Tooltip } from "radix-ui";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { ClassesView, type ClassesViewProps } from "@/components/classes/classes-view";
import { LengthUnitProvider } from "@/components/shell/length-unit";
import type { NetClassRow } from "@/lib/client/net-classes";
import type { BindingDoc, StoredModel } from "@/lib/schemas/model";
import { type NetClassDoc, netClassDoc } from "@/lib/schemas/net-class";
import { defaultRuleSet } from "@/lib/si/rules";
import { aClass, aModel } from "../../support/documents";

const PROJECT = "0198f000-0000-7000-8000-000000000001";
const uuid = (index: number) => `0198f000-0000-7000-8000-2000000000${String(index).padStart(2, "0")}`;

const layers = [
  { lineageId: uuid(90), name: "L1 Top" },
  { lineageId: uuid(91), name: "L3 Inner" },
];

function row(index: number, name: string, over: Partial<NetClassDoc> = {}, netCount = 0): NetClassRow {
  return { ...aClass(name, over), id: uuid(index), lineageId: uuid(index + 20), version: 4, netCount };
}
const model: StoredModel = { ...aModel("Controller pin"), id: uuid(60), lineageId: uuid(61), version: 0 };

interface Call {
  method: string;
  address: string;
  body: { version: number; netClass: NetClassDoc; bindings: BindingDoc[] };
}
let calls: Call[] = [];
let answer: ((call: Call) => Response | null) | null = null;
const puts = () => calls.filter(({ method }) => method === "PUT");

beforeAll(() => {
  Object.defineProperty(Element.prototype, "scrollIntoView", { value: () => undefined });
  globalThis.ResizeObserver ??= class {
    observe() {}
    unobserve() {}
    disconnect() {}
  };
});
beforeEach(() => {
  calls = [];
  answer = null;
  vi.stubGlobal(
    "fetch",
    vi.fn(async (address: string, init?: RequestInit) => {
      const method = init?.method ?? "GET";
      if (method === "GET") {
        if (address.includes("/undo")) return Response.json({ undo: null, redo: null });
        if (address.includes("/matches"))
          return Response.json({
            version: 1,
            pins: 9,
            lines: [
              { fits: 4, takes: 4 },
              { fits: 0, takes: 0 },
            ],
            pinsWithoutModel: 1,
            withoutModel: [
              { reference: "U7", partNumber: "", needs: "driver", pins: 1, examples: ["U7.3 on TIDE_1"] },
            ],
          });
        // Lists are fetched anew after a change: what they answer is not looked at here.
        return new Response("{}", { status: 500 });
      }
      const call: Call = {
        method,
        address,
        body: JSON.parse((init?.body as string | undefined) ?? "{}") as Call["body"],
      };
      const refused = answer?.(call);
      if (refused) return refused;
      calls.push(call);
      if (address.includes("/classes/")) {
        netClassDoc.parse(call.body.netClass);
        return Response.json({
          ...call.body.netClass,
          id: address.split("/").at(-1),
          lineageId: uuid(21),
          version: call.body.version + 1,
        });
      }
      return Response.json({
        version: 2,
        bindings: call.body.bindings.map((line, at) => ({ ...line, id: uuid(70 + at) })),
      });
    }),
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(over: Partial<ClassesViewProps> = {}, searchParams = "") {
  render(
    <NuqsTestingAdapter searchParams={searchParams} hasMemory>
      <QueryClientProvider
        client={new QueryClient({ defaultOptions: { queries: { retry: false, staleTime: Infinity } } })}
      >
        <LengthUnitProvider initial="mm">
          <Tooltip.Provider>
            <ClassesView
              projectId={PROJECT}
              revision="B"
              search=""
              unit="mm"
              layers={layers}
              ruleSet={{ ...defaultRuleSet(), version: 0 }}
              classes={[row(1, "Clock"), row(2, "Memory data", {}, 16), row(3, "Flash")]}
              models={[model]}
              bindings={{ version: 1, bindings: [] }}
              readOnly={null}
              limitsReadOnly="A reviewer or the owner of the team sets limits."
              {...over}
            />
          </Tooltip.Provider>
        </LengthUnitProvider>
      </QueryClientProvider>
    </NuqsTestingAdapter>,
  );
  return userEvent.setup();
}

const panel = () => within(screen.getByRole("complementary"));
const field = (name: RegExp) => panel().getByRole<HTMLInputElement>("textbox", { name });

/** A field selects its text in the frame after it is entered: typing over it begins once that is done. */
async function write(user: ReturnType<typeof show>, input: HTMLElement, text: string): Promise<void> {
  await user.click(input);
  await new Promise(requestAnimationFrame);
  await user.clear(input);
  await user.type(input, text, { skipClick: true });
}

describe("a class beside the table", () => {
  it("keeps a refused text with its reason and saves nothing until it is mended", async () => {
    const user = show({}, `?at=${uuid(21)}`);
    await write(user, field(/^Edge/), "1..2 ns");
    await user.tab();
    expect(field(/^Edge/).value).toBe("1..2 ns");
    expect(panel().getByRole("alert").textContent).toMatch(/is not a time/);
    expect(panel().getByRole("status").textContent).toMatch(/Not saved: 1 thing needs mending/);

    await write(user, field(/^Tolerance/), "12");
    await user.tab();
    // Another class is not opened over what is not saved.
    await user.click(screen.getByText("Flash"));
    expect(await screen.findByDisplayValue("1..2 ns")).toBeTruthy();
    expect(puts()).toEqual([]);

    await write(user, field(/^Edge/), "1.2{Enter}");
    await waitFor(() => expect(puts()).toHaveLength(1), { timeout: 5000 });
    expect(puts()[0]?.body).toMatchObject({
      version: 4,
      netClass: { edge: { value: "1.2", unit: "ns" }, tolerancePercent: "12" },
    });
  });

  it("says who changed it meanwhile and in what, and saves this person's fields over theirs when told to", async () => {
    const theirs = row(1, "Clock", { spacing: { value: "0.4", unit: "mm" } });
    let first = true;
    answer = () => {
      if (!first) return null;
      first = false;
      return Response.json(
        {
          error: {
            code: "conflict",
            message: "The class was changed by Ada Reed after you opened it (spacing).",
            current: { ...theirs, version: 5 },
            changed: ["spacing"],
          },
        },
        { status: 409 },
      );
    };
    const user = show({}, `?at=${uuid(21)}`);
    await write(user, field(/^Edge/), "2 ns{Enter}");
    const alert = await panel().findByRole("alert", {}, { timeout: 5000 });
    expect(alert.textContent).toContain("Ada Reed");
    expect(within(alert).getByRole("listitem").textContent).toBe("spacing");

    await user.click(within(alert).getByRole("button", { name: "Keep mine" }));
    await waitFor(() => expect(puts()).toHaveLength(1), { timeout: 5000 });
    expect(puts()[0]?.body).toMatchObject({
      version: 5,
      netClass: { edge: { value: "2", unit: "ns" }, spacing: { value: "0.4", unit: "mm" } },
    });
  });

  it("warns of a class without a layer and writes the width of one that is allowed", async () => {
    const user = show({}, `?at=${uuid(21)}`);
    expect(panel().getByText(/No layer is allowed yet/)).toBeTruthy();
    await user.click(panel().getByRole("checkbox", { name: "L3 Inner" }));
    await write(user, panel().getByRole("textbox", { name: "Width on L3 Inner" }), "5 mil{Enter}");
    await waitFor(
      () =>
        expect(puts().at(-1)?.body.netClass.layers).toEqual([
          { layerLineageId: uuid(91), width: { value: "5", unit: "mil" }, gap: null },
        ]),
      { timeout: 5000 },
    );
  });

  it("shows limits to a designer and who may set them; a reviewer sets them and nothing else", async () => {
    show({}, `?at=${uuid(21)}`);
    expect(panel().queryByRole("combobox", { name: "Spacing in this class" })).toBeNull();
    expect(panel().getByText(/A reviewer or the owner of the team sets limits/)).toBeTruthy();
    cleanup();

    const user = show({ readOnly: "Designers edit classes.", limitsReadOnly: null }, `?at=${uuid(21)}`);
    expect(panel().queryByRole("textbox", { name: /^Edge/ })).toBeNull();
    const [rule] = panel().getAllByRole("combobox", { name: /in this class$/ });
    if (!rule) throw new Error("No rule is listed.");
    await user.selectOptions(rule, "off");
    await waitFor(() => expect(puts()).toHaveLength(1), { timeout: 5000 });
    expect(Object.values(puts()[0]?.body.netClass.limits ?? {})).toEqual([
      { enabled: false, limit: null, note: "" },
    ]);
  });
});

describe("a change to several classes", () => {
  it("sends one change for each ticked class, at the version it was read at", async () => {
    const user = show();
    const rows = screen.getAllByRole("checkbox", { name: "Tick this row" });
    for (const box of rows.slice(0, 2)) await user.click(box);
    const form = within(screen.getByRole("form", { name: "Change the ticked classes" }));
    await user.type(form.getByRole("textbox", { name: "Tolerance" }), "7 %");
    await user.selectOptions(form.getByRole("combobox", { name: "Driver model" }), model.lineageId);
    await user.selectOptions(form.getByRole("combobox", { name: "Termination" }), "series");
    await user.click(form.getByRole("button", { name: "Change 2 classes" }));
    await waitFor(() => expect(puts()).toHaveLength(2));
    expect(puts().map(({ address }) => address.split("/").at(-1))).toEqual([uuid(1), uuid(2)]);
    for (const { body } of puts())
      expect(body).toMatchObject({
        version: 4,
        netClass: {
          tolerancePercent: "7",
          driverModelLineageId: model.lineageId,
          // 50 Ω − 17 Ω = 33 Ω, an E24 value (IEC 60063).
          termination: { scheme: "series", resistance: { value: "33", unit: "Ω" } },
        },
      });
  });

  it("refuses a text that is no tolerance and sends nothing", async () => {
    const user = show();
    await user.click(screen.getAllByRole("checkbox", { name: "Tick this row" })[0] as HTMLElement);
    const form = within(screen.getByRole("form", { name: "Change the ticked classes" }));
    await user.type(form.getByRole("textbox", { name: "Tolerance" }), "wide");
    await user.click(form.getByRole("button", { name: "Change 1 class" }));
    expect(await form.findByText(/'wide' is not a number/)).toBeTruthy();
    expect(puts()).toEqual([]);
  });
});

describe("bindings", () => {
  const line = (referencePattern: string): BindingDoc => ({
    referencePattern,
    partNumberPattern: "*",
    pinPattern: "*",
    netPattern: "*",
    role: "receiver",
    modelLineageId: null,
  });
  const bindings = {
    version: 1,
    bindings: [
      { ...line("U1"), id: uuid(70) },
      { ...line("U9"), id: uuid(71) },
    ],
  };

  it("counts the pins of each row, marks those that fit none, and names pins without a model", async () => {
    show({ bindings }, "?tab=bindings");
    expect(await screen.findByText("4 pins")).toBeTruthy();
    expect(screen.getByText("fits no pin")).toBeTruthy();
    expect(within(screen.getByRole("table", { name: "Pins without a model" })).getByText("U7")).toBeTruthy();
  });

  it("moves a row, since the first that fits decides", async () => {
    const user = show({ bindings }, "?tab=bindings");
    await user.click(screen.getByRole("button", { name: "Move row 2 up" }));
    await waitFor(() => expect(puts()).toHaveLength(1), { timeout: 5000 });
    expect(puts()[0]?.body.bindings.map(({ referencePattern }) => referencePattern)).toEqual(["U9", "U1"]);
  });
});
