// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { useState } from "react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { QuantityField } from "@/components/ui/quantity-field";
import type { Quantity } from "@/lib/si/units";

afterEach(cleanup);

function Harness({
  initial,
  onChange,
}: {
  initial: Quantity | null;
  onChange?: (q: Quantity | null) => void;
}) {
  const [value, setValue] = useState(initial);
  return (
    <QuantityField
      label="Width"
      dimension="length"
      unit="mm"
      value={value}
      onChange={(next) => {
        setValue(next);
        onChange?.(next);
      }}
    />
  );
}

const field = () => screen.getByRole<HTMLInputElement>("textbox", { name: "Width" });

describe("quantity field", () => {
  it("reads a bare number in the field's unit, and a unit where one is written", async () => {
    const onChange = vi.fn();
    const user = userEvent.setup();
    render(<Harness initial={null} onChange={onChange} />);
    await user.type(field(), "0,127");
    await user.tab();
    expect(onChange).toHaveBeenLastCalledWith({ value: "0.127", unit: "mm" });
    expect(field().value).toBe("0.127 mm");

    await user.clear(field());
    await user.type(field(), "5 mil{Enter}");
    expect(onChange).toHaveBeenLastCalledWith({ value: "5", unit: "mil" });
  });

  it("shows a value in the reader's unit, and as it was typed once the field is entered", async () => {
    const onChange = vi.fn();
    const user = userEvent.setup();
    render(<Harness initial={{ value: "5", unit: "mil" }} onChange={onChange} />);
    expect(field().value).toBe("0.127 mm");
    await user.click(field());
    expect(field().value).toBe("5 mil");
    await user.tab();
    expect(onChange).not.toHaveBeenCalled();
    expect(field().value).toBe("0.127 mm");
  });

  it("keeps the text that it cannot read, says why, and takes Escape back to the value", async () => {
    const onChange = vi.fn();
    const user = userEvent.setup();
    render(<Harness initial={{ value: "0.1", unit: "mm" }} onChange={onChange} />);
    await user.clear(field());
    await user.type(field(), "12..7");
    await user.tab();
    expect(field().value).toBe("12..7");
    expect(screen.getByRole("alert").textContent).toContain("'12..7' is not a length");
    expect(field().getAttribute("aria-invalid")).toBe("true");
    expect(onChange).not.toHaveBeenCalled();

    await user.click(field());
    await user.keyboard("{Escape}");
    expect(field().value).toBe("0.1 mm");
    expect(screen.queryByRole("alert")).toBeNull();
  });

  it("refuses an empty field unless it may be empty", async () => {
    const user = userEvent.setup();
    render(<Harness initial={{ value: "0.1", unit: "mm" }} />);
    await user.clear(field());
    await user.tab();
    expect(screen.getByRole("alert").textContent).toContain("Nothing is written");
  });
});
