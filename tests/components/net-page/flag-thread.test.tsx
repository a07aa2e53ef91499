// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeEach, expect, it, vi } from "vitest";
import type { FlagFacts } from "@/components/net-page/facts";
import { FlagThread } from "@/components/net-page/flag-thread";
import { factsOf, ringing } from "./facts";

vi.mock("next/navigation", () => ({ useRouter: () => ({ refresh: vi.fn() }) }));

beforeEach(() => sessionStorage.clear());
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const flag = (id: string) =>
  ({
    id,
    version: 0,
    state: "open",
    assigneeUserId: null,
    assigneeName: null,
    entries: [],
  }) as never as FlagFacts;
const show = (id: string) => render(<FlagThread facts={factsOf(ringing)} flag={flag(id)} />);
const answer = () => screen.getByRole<HTMLTextAreaElement>("textbox", { name: "Answer" });

it("a half-written comment is there again after leaving, in its own thread only, until it is sent", async () => {
  show("f-1");
  fireEvent.change(answer(), { target: { value: "Fit 33 Ω at the" } });
  cleanup();
  show("f-2");
  expect(answer().value).toBe("");
  cleanup();
  show("f-1");
  expect(answer().value).toBe("Fit 33 Ω at the");
  vi.stubGlobal(
    "fetch",
    vi.fn(async () => Response.json({}, { status: 201 })),
  );
  fireEvent.click(screen.getByRole("button", { name: "Comment" }));
  await waitFor(() => expect(answer().value).toBe(""));
  cleanup();
  show("f-1");
  expect(answer().value).toBe("");
});
