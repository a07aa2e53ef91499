// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor, within } from "@testing-library/react";
import { NuqsTestingAdapter } from "nuqs/adapters/testing";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { NetFacts } from "@/components/net-page/facts";
import { NetPage } from "@/components/net-page/net-page";
import { LengthUnitProvider } from "@/components/shell/length-unit";
import { directEngine, factsOf, ringing } from "./facts";

vi.mock("next/navigation", () => ({ useRouter: () => ({ refresh: vi.fn() }) }));

beforeEach(() => {
  vi.stubGlobal(
    "ResizeObserver",
    class {
      observe(): void {}
      unobserve(): void {}
      disconnect(): void {}
    },
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(facts: NetFacts, search = "") {
  return render(
    <NuqsTestingAdapter searchParams={search} hasMemory>
      <LengthUnitProvider initial="mm">
        <NetPage facts={facts} mayEdit engine={directEngine} />
      </LengthUnitProvider>
    </NuqsTestingAdapter>,
  );
}

/** The text alternative of a drawing. */
const descriptionOf = (name: string) =>
  screen.getByRole("img", { name }).getAttribute("aria-describedby") ?? "";

const cursors = () =>
  screen
    .getAllByRole("slider", { name: "Time of the cursor" })
    .map((slider) => slider.getAttribute("aria-valuetext")?.split(".")[0] ?? "");

/** The scrubber of the bar and the plots of waveforms and bounces. */
const drawn = () => waitFor(() => expect(cursors()).toHaveLength(3));

describe("the page of a net", () => {
  it("stands at the worst finding: its corner, its edge, its time, with the cause", async () => {
    show(factsOf(ringing));
    await drawn();
    expect(screen.getByRole("region", { name: "Why" }).textContent).toContain("The driver is 14");
    expect(screen.getByRole("radio", { name: /^fast driver, high impedance: fail/ })).toHaveProperty(
      "checked",
      true,
    );
    await waitFor(() => expect(new Set(cursors()).size).toBe(1));
    expect(cursors()[0]).not.toBe("0");
  });

  it("shares one cursor: moving it in one drawing moves it in the others", async () => {
    show(factsOf(ringing));
    await drawn();
    const [bar] = screen.getAllByRole("slider", { name: "Time of the cursor" });
    if (!bar) throw new Error("the bar has a slider");
    fireEvent.change(bar, { target: { value: "500" } });
    const at = screen.getByRole("status").textContent;
    for (const slider of screen.getAllByRole("slider", { name: "Time of the cursor" }))
      expect(slider.getAttribute("aria-valuetext")).toContain(at);
  });

  it("moves cursor and edge to where another finding happens when it is chosen", async () => {
    show(factsOf(ringing));
    await drawn();
    fireEvent.click(within(screen.getByRole("table")).getByRole("button", { name: "Below rail" }));
    expect(screen.getByRole("radio", { name: "falling" })).toHaveProperty("checked", true);
    fireEvent.click(screen.getByRole("radio", { name: /^slow driver, low impedance/ }));
    expect(screen.getByRole("radio", { name: /^slow driver, low impedance/ })).toHaveProperty(
      "checked",
      true,
    );
    fireEvent.click(within(screen.getByRole("table")).getByRole("button", { name: "Above rail" }));
    expect(screen.getByRole("radio", { name: "rising" })).toHaveProperty("checked", true);
    expect(screen.getByRole("radio", { name: /^fast driver, high impedance/ })).toHaveProperty(
      "checked",
      true,
    );
  });

  it("judges a change on trial at once and lays the wave before it beneath, the path itself unchanged", async () => {
    const facts = factsOf(ringing);
    show(facts, "?series=43");
    await drawn();
    await waitFor(() => expect(screen.getByRole("columnheader", { name: "With the change" })).toBeTruthy());
    const row = screen.getByRole("row", { name: /Above rail/ });
    await waitFor(() => expect(within(row).getByText("pass")).toBeTruthy());
    expect(within(row).getByText("fail")).toBeTruthy();
    expect(ringing.parts).toEqual([]);
  });

  it("says what is missing and the way out, and still draws the topology", () => {
    const missing = [
      { input: "driver model of U1", detail: "U1.1 drives NET, and nothing gives it a model." },
    ];
    show(factsOf({ ...ringing, missing }));
    expect(screen.getByText("Missing: driver model of U1")).toBeTruthy();
    expect(screen.getByRole("link", { name: "Open classes and models" }).getAttribute("href")).toContain(
      "/classes",
    );
    expect(screen.getByRole("img", { name: "Topology of NET" })).toBeTruthy();
    expect(screen.queryByRole("slider", { name: "Time of the cursor" })).toBeNull();
  });

  it("draws the topology with the values of the corner that is looked at", async () => {
    show(factsOf(ringing));
    await drawn();
    const strip = () => document.getElementById(descriptionOf("Topology of NET"))?.textContent;
    expect(strip()).toContain("U1.1 (14\u2009\u03a9): section 55\u2009\u03a9");
    fireEvent.click(screen.getByRole("radio", { name: /^slow driver, low impedance/ }));
    expect(strip()).toContain("U1.1 (30\u2009\u03a9): section 45\u2009\u03a9");
  });

  it("says what the width gives where the line is judged at its class's target", async () => {
    const sections = ringing.sections.map((entry) => ({
      ...entry,
      width: 0.18e-3,
      method: "class target; delay from a field solution",
    }));
    const widths = [
      { width: 0.1e-3, impedance: 90 },
      { width: 0.18e-3, impedance: 72.7 },
      { width: 0.4e-3, impedance: 48 },
    ];
    const target = { ohms: 50, tolerance: 0.1, kind: "single" as const };
    show(factsOf({ ...ringing, sections, target }, { widths }));
    expect(
      await screen.findByText(/^as it is · gives 72\.7 Ω; judged at the class target, 50 Ω$/),
    ).toBeTruthy();
    expect(screen.getByText(/^Judged at the class target, 50 Ω; 0\.180 mm on .* gives 72\.7 Ω/)).toBeTruthy();
  });

  it("keeps a value that is out of range with its reason until it is mended or put back", async () => {
    show(factsOf(ringing));
    const field = await screen.findByRole<HTMLInputElement>("textbox", {
      name: "Series resistor at the driver",
    });
    const back = () => screen.getByRole<HTMLButtonElement>("button", { name: "Put all back" });
    const write = (text: string) => {
      const present = screen.getByRole("textbox", { name: "Series resistor at the driver" });
      fireEvent.focus(present);
      fireEvent.change(present, { target: { value: text } });
      fireEvent.blur(present);
    };
    write("1e12");
    expect(field.value).toBe("1e12");
    const wrong = () => screen.queryByText(/is out of range\. Write 0 Ω to 10 kΩ\.$/);
    expect(wrong()).toBeTruthy();
    fireEvent.click(back());
    expect(wrong()).toBeNull();
    expect(back().disabled).toBe(true);
    write("1e12");
    expect(wrong()).toBeTruthy();
    write("33");
    expect(wrong()).toBeNull();
  });
});
