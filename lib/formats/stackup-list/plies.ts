import type { StackupLayerDoc } from "@/lib/schemas/stackup";
import { parseQuantity } from "@/lib/si/units";

type Ply = StackupLayerDoc["plies"][number];

const PLY = /^(\d{1,2})\s*[x×]\s*(\S+?)(?:\s+([\d.,]+)\s*%)?\s+(.+)$/iu;

/** "2 × 1080 62 % 76 µm + 1 × 2116 120 µm" */
export function writePlies(plies: readonly Ply[]): string {
  return plies
    .map(({ count, style, resinPercent, thickness }) =>
      [
        `${count} ×`,
        style || "?",
        ...(resinPercent === null ? [] : [`${resinPercent} %`]),
        `${thickness.value} ${thickness.unit}`,
      ].join(" "),
    )
    .join(" + ");
}

/** @returns null where the text is not of that form. @throws DomainError for a thickness that is none */
export function readPlies(text: string): Ply[] | null {
  if (text === "") return [];
  const plies: Ply[] = [];
  for (const item of text.split("+")) {
    const match = PLY.exec(item.trim());
    if (!match) return null;
    const [, count = "", style = "", resin, thickness = ""] = match;
    plies.push({
      count: Number(count),
      style: style === "?" ? "" : style,
      resinPercent: resin?.replace(",", ".") ?? null,
      thickness: parseQuantity(thickness, "length", "µm"),
    });
  }
  return plies;
}
