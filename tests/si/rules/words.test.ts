import { describe, expect, it } from "vitest";
import { ohms, withArticle } from "@/lib/si/rules/words";

describe("the article before a number goes by how it is spoken", () => {
  it.each([
    [50, "a 50 Ω"],
    [80, "an 80 Ω"],
    [8.2, "an 8.2 Ω"],
    [11, "an 11 Ω"],
    [18.4, "an 18.4 Ω"],
    [180, "a 180 Ω"],
    [1.8, "a 1.8 Ω"],
    [0.8, "a 0.8 Ω"],
  ])("%d: %s", (value, said) => {
    expect(withArticle(ohms(value))).toBe(said);
  });
});
