import { afterEach, beforeEach, vi } from "vitest";

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
