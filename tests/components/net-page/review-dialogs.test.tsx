// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import type { ProblemFacts } from "@/components/net-page/facts";
import { FlagDialog } from "@/components/net-page/flag-dialog";
import { WaiveDialog } from "@/components/net-page/waive-dialog";
import { factsOf, ringing } from "./facts";

vi.mock("next/navigation", () => ({ useRouter: () => ({ refresh: vi.fn() }) }));

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const problem: ProblemFacts = {
  id: "p-1",
  mechanism: "driver mismatch",
  title: "Driver does not match the line",
  verdict: "fail",
  worstRule: "above-rail",
  cause: null,
  missing: null,
  flags: [],
  waiver: null,
};

/** What the first request carried. */
function sentBy(fetching: ReturnType<typeof answer>): unknown {
  const body = fetching.mock.calls[0]?.[1].body;
  return typeof body === "string" ? JSON.parse(body) : null;
}

function answer(status: number, body: unknown) {
  const fetching = vi.fn(async (_url: string, _init: RequestInit) => Response.json(body, { status }));
  vi.stubGlobal("fetch", fetching);
  return fetching;
}

describe("review dialogs", () => {
  it("keep what was typed when the server refuses, and show its sentence", async () => {
    const message = "You edited this draft, so another reviewer must waive a problem of it.";
    const fetching = answer(409, { error: { code: "editor", message } });
    const close = vi.fn();
    render(<WaiveDialog facts={factsOf(ringing)} problem={problem} onClose={close} />);
    fireEvent.change(screen.getByLabelText("Reason"), {
      target: { value: "Measured on the bench, 3 boards." },
    });
    fireEvent.change(screen.getByLabelText("Holds until"), { target: { value: "2027-03-01" } });
    fireEvent.click(screen.getByRole("button", { name: "Waive it" }));
    expect(await screen.findByText(message)).toBeTruthy();
    expect(screen.getByLabelText("Reason")).toHaveProperty("value", "Measured on the bench, 3 boards.");
    expect(screen.getByLabelText("Holds until")).toHaveProperty("value", "2027-03-01");
    expect(close).not.toHaveBeenCalled();
    expect(sentBy(fetching)).toMatchObject({
      subject: { kind: "problem", lineageId: "net-1", mechanism: "driver mismatch" },
      expiresAt: Date.UTC(2027, 2, 1, 23, 59, 59),
    });
  });

  it("ask for a day before anything is sent", () => {
    const fetching = answer(201, {});
    render(<WaiveDialog facts={factsOf(ringing)} problem={problem} onClose={vi.fn()} />);
    fireEvent.click(screen.getByRole("button", { name: "Waive it" }));
    expect(screen.getByText("Choose the last day on which it holds.")).toBeTruthy();
    expect(fetching).not.toHaveBeenCalled();
  });

  it("flag with comment and assignee, then close", async () => {
    const fetching = answer(201, { id: "f-1" });
    const close = vi.fn();
    render(<FlagDialog facts={factsOf(ringing)} problem={null} onClose={close} />);
    fireEvent.change(screen.getByLabelText("Comment"), { target: { value: "Look at this." } });
    fireEvent.change(screen.getByLabelText("Assign to"), { target: { value: "u-1" } });
    fireEvent.click(screen.getByRole("button", { name: "Flag it" }));
    await vi.waitFor(() => expect(close).toHaveBeenCalled());
    expect(sentBy(fetching)).toEqual({
      subject: { kind: "path", lineageId: "net-1", mechanism: null },
      comment: "Look at this.",
      assigneeUserId: "u-1",
    });
  });
});
