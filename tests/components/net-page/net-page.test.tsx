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
});
