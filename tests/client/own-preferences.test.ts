// @vitest-environment jsdom
import { afterEach, beforeEach, expect, describe, it, vi } from "vitest";
import { bringPreferences, choosePreference } from "@/lib/client/own-preferences";

/** What the server keeps of this person. */
let kept: unknown;
let reached: boolean;

beforeEach(() => {
  kept = { lengthUnit: "mm", theme: "system" };
  reached = true;
  for (const name of ["length-unit", "theme"]) document.cookie = `${name}=; path=/; max-age=0`;
  vi.stubGlobal(
    "fetch",
    vi.fn(async (_address: string, init?: RequestInit) => {
      if (!reached) throw new TypeError("no connection");
      if (init?.method === "PUT") kept = JSON.parse(init.body as string);
      return Response.json(kept);
    }),
  );
});
afterEach(() => vi.unstubAllGlobals());

describe("a person's own preferences", () => {
  it("go to the account and to this device, each choice beside the others", async () => {
    await choosePreference({ lengthUnit: "mil" });
    await choosePreference({ theme: "dark" });
    expect(kept).toEqual({ lengthUnit: "mil", theme: "dark" });
    expect(document.cookie).toContain("length-unit=mil");
  });

  it("come along at the next sign-in, over what somebody else chose here", async () => {
    document.cookie = "length-unit=mm; path=/";
    kept = { lengthUnit: "mil", theme: "light" };
    await bringPreferences();
    expect(document.cookie).toContain("length-unit=mil");
    expect(document.cookie).toContain("theme=light");
  });

  it("stay on this device where the server is not reached", async () => {
    reached = false;
    await choosePreference({ lengthUnit: "mil" });
    expect(document.cookie).toContain("length-unit=mil");
  });
});
