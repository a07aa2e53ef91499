// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { PlaybackBar } from "@/components/charts/playback-bar";
import { usePlayback } from "@/components/charts/use-playback";

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function Bar() {
  return <PlaybackBar control={usePlayback(0, 6e-9)} />;
}

/** Frames that come when the test says so. */
function manualFrames() {
  let next: FrameRequestCallback | null = null;
  vi.stubGlobal("requestAnimationFrame", (callback: FrameRequestCallback) => {
    next = callback;
    return 1;
  });
  vi.stubGlobal("cancelAnimationFrame", () => {
    next = null;
  });
  return (now: number) => act(() => next?.(now));
}

describe("PlaybackBar", () => {
  it("runs with the frames, by 0.1 s of 12 s of the span, and stops on pause", () => {
    const frame = manualFrames();
    render(<Bar />);
    fireEvent.click(screen.getByRole("button", { name: "Play" }));
    frame(0);
    frame(100);
    expect(screen.getByRole("status").textContent).toBe("0.05\u2009ns");
    fireEvent.click(screen.getByRole("button", { name: "Pause" }));
    frame(200);
    expect(screen.getByRole("status").textContent).toBe("0.05\u2009ns");
  });

  it("scrubs and steps", () => {
    render(<Bar />);
    fireEvent.change(screen.getByRole("slider", { name: "Time of the cursor" }), {
      target: { value: "500" },
    });
    expect(screen.getByRole("status").textContent).toBe("3.00\u2009ns");
    fireEvent.click(screen.getByRole("button", { name: "Step on" }));
    expect(screen.getByRole("status").textContent).toBe("3.10\u2009ns");
  });

  it("offers steps in place of motion to those who want none", () => {
    vi.stubGlobal("matchMedia", () => ({
      matches: true,
      addEventListener: () => {},
      removeEventListener: () => {},
    }));
    render(<Bar />);
    expect(screen.queryByRole("button", { name: "Play" })).toBeNull();
    expect(screen.getByRole("button", { name: "Step on" })).toBeTruthy();
  });
});
