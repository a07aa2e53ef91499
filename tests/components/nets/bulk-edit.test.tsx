// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it, vi } from "vitest";
import { BulkEdit } from "@/components/nets/bulk-edit";
import type { NetRow } from "@/lib/client/nets";

afterEach(cleanup);
const nets = [{ id: "1" }, { id: "2" }] as NetRow[];

function draw() {
  const onApply = vi.fn();
  render(
    <BulkEdit
      nets={nets}
      classes={[{ lineageId: "c1", name: "Data" }]}
      busy={false}
      onApply={onApply}
      onClear={vi.fn()}
    />,
  );
  return { onApply, user: userEvent.setup() };
}

describe("BulkEdit", () => {
  it("sends only what was chosen", async () => {
    const { onApply, user } = draw();
    expect(screen.getByRole<HTMLButtonElement>("button", { name: "Change 2 nets" }).disabled).toBe(true);
    await user.selectOptions(screen.getByLabelText("Class"), "Data");
    await user.click(screen.getByRole("button", { name: "Change 2 nets" }));
    expect(onApply).toHaveBeenCalledWith({ classLineageId: "c1" });
  });

  it("asks why nets are left out, and sends the reason with the kind", async () => {
    const { onApply, user } = draw();
    await user.selectOptions(screen.getByLabelText("Scope"), "Out: power");
    await user.click(screen.getByRole("button", { name: "Change 2 nets" }));
    expect(onApply).not.toHaveBeenCalled();
    expect(screen.getByRole("alert").textContent).toBe("Say why these nets are left out.");
    await user.type(screen.getByLabelText("Reason"), "A supply.");
    await user.click(screen.getByRole("button", { name: "Change 2 nets" }));
    expect(onApply).toHaveBeenCalledWith({ scope: "out", scopeKind: "power", scopeReason: "A supply." });
  });

  it("brings nets back in scope without a reason, and takes a match group away with a dash", async () => {
    const { onApply, user } = draw();
    await user.selectOptions(screen.getByLabelText("Scope"), "In scope");
    await user.type(screen.getByLabelText("Match group"), "-");
    await user.click(screen.getByRole("button", { name: "Change 2 nets" }));
    expect(onApply).toHaveBeenCalledWith({
      scope: "in",
      scopeKind: "signal",
      scopeReason: "",
      matchGroup: null,
    });
  });
});
