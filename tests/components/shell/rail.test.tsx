// @vitest-environment jsdom
import { cleanup, render, screen } from "@testing-library/react";
import { afterEach, expect, it, vi } from "vitest";
import { Rail } from "@/components/shell/rail";

vi.mock("next/navigation", () => ({
  usePathname: () => "/projects/0198f000-0000-7000-8000-000000000001/review",
  useSearchParams: () => new URLSearchParams(),
}));

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

it("a strip that is narrower than its places stands with the present one in the middle", () => {
  vi.spyOn(Element.prototype, "clientWidth", "get").mockReturnValue(390);
  vi.spyOn(Element.prototype, "getBoundingClientRect").mockImplementation(function (this: Element) {
    return this.matches("[aria-current=page]") ? new DOMRect(700, 0, 80, 32) : new DOMRect(0, 0, 390, 40);
  });
  render(<Rail mayReadAudit={false} />);
  expect(screen.getByRole("link", { current: "page" }).textContent).toBe("Review");
  expect(screen.getByRole("navigation", { name: "Places" }).scrollLeft).toBe(740 - 195);
});
