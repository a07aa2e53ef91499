import fc from "fast-check";
import { afterEach, beforeEach, vi } from "vitest";

// The same properties on the same examples each time; the long campaigns take seeds of their own.
fc.configureGlobal({ seed: 20_261_201 });

// A busy machine is no fault of a component.
if (typeof document !== "undefined")
  (await import("@testing-library/react")).configure({ asyncUtilTimeout: 15_000 });

// Unexpected console output is a fault: a test that means to print spies on the console itself.
const silent = ["error", "warn"] as const;

beforeEach(() => {
  for (const method of silent) {
    vi.spyOn(console, method).mockImplementation((...args: unknown[]) => {
      throw new Error(`Unexpected console.${method}: ${args.map(String).join(" ")}`);
    });
  }
});

afterEach(() => {
  vi.restoreAllMocks();
});
