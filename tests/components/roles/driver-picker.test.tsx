// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { useState } from "react";
import { afterEach, describe, expect, it } from "vitest";
import { DriverPicker } from "@/components/roles/driver-picker";
import { activeParts, moved, pinsOf, type RoleRow, roleRow } from "@/components/roles/role-rows";
import { assignRoles } from "@/lib/formats/pin-roles";
import type { DraftProposals } from "@/lib/schemas/name-proposals";

afterEach(cleanup);

const pins: DraftProposals["pins"] = {
  nets: ["A", "B"],
  references: [
    { reference: "U1", partNumber: "MCU", kind: "ic" },
    { reference: "R1", partNumber: "", kind: "resistor" },
    { reference: "U2", partNumber: "", kind: "ic" },
  ],
  pins: [
    [0, 0, "1", ""],
    [0, 1, "1", ""],
    [1, 0, "2", ""],
    [1, 2, "1", "receiver"],
  ],
};

function Picker() {
  const [rules, setRules] = useState<RoleRow[]>([]);
  const result = assignRoles(pinsOf(pins), rules);
  return (
    <>
      <DriverPicker pins={pins} rules={rules} onChange={setRules} />
      <output>{rules.map((rule) => `${rule.referencePattern} ${rule.role}`).join("; ")}</output>
      <p>{`${result.pins.driver} drive, ${result.pins.receiver} receive, ${result.pins.open} open`}</p>
    </>
  );
}

describe("DriverPicker", () => {
  it("offers parts that could drive, and puts their rule before the rule for the rest", async () => {
    render(<Picker />);
    const user = userEvent.setup();
    expect(screen.queryByLabelText(/R1/)).toBeNull();
    await user.click(screen.getByLabelText("All other pins of U and J parts receive"));
    await user.click(screen.getByLabelText("U1, MCU"));
    expect(screen.getByRole("status").textContent).toBe("U1 driver; U* receiver; J* receiver");
    expect(screen.getByText("2 drive, 1 receive, 1 open")).toBeTruthy();
    await user.click(screen.getByLabelText("U1, MCU"));
    expect(screen.getByRole("status").textContent).toBe("U* receiver; J* receiver");
  });
});

it("orders parts by pins and moves rules by one place", () => {
  expect(activeParts(pins).map(({ reference, pins: count }) => [reference, count])).toEqual([
    ["U1", 2],
    ["U2", 1],
  ]);
  const rows = [roleRow({ role: "driver" }), roleRow({ role: "receiver" })];
  expect(moved(rows, 0, 1)).toEqual([rows[1], rows[0]]);
});
