import type { Drawing, Mark, TextMark } from "@/lib/drawings/marks";

/** Every text mark of a drawing, inside groups too. */
export function textMarks(drawing: Pick<Drawing, "marks">): TextMark[] {
  const all = (mark: Mark): TextMark[] =>
    mark.kind === "text" ? [mark] : mark.kind === "group" ? mark.marks.flatMap(all) : [];
  return drawing.marks.flatMap(all);
}

/** The words of a drawing. */
export function texts(drawing: Pick<Drawing, "marks">): string[] {
  return textMarks(drawing).map((t) => t.spans.map((s) => s.text).join(""));
}
