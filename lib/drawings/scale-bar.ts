import { line, type Mark, text } from "./marks";
import { type LengthUnit, withUnit } from "./number-text";

/** A bar of a round length, so that a printed drawing can be measured. */
export function scaleBar(x: number, y: number, pxPerMetre: number, room: number, unit: LengthUnit): Mark[] {
  if (!(pxPerMetre > 0)) return [];
  const metres = unit === "mm" ? 1e-3 : 25.4e-6;
  const most = room / pxPerMetre / metres;
  const decade = 10 ** Math.floor(Math.log10(most));
  const length = [5, 2, 1].map((n) => n * decade).find((n) => n <= most) ?? decade;
  const end = x + length * metres * pxPerMetre;
  const style = { stroke: "ink-soft", weight: 1 } as const;
  return [
    line(x, y, end, y, style),
    line(x, y - 4, x, y + 4, style),
    line(end, y - 4, end, y + 4, style),
    text(end + 8, y + 4, withUnit(String(Number(length.toPrecision(1))), unit), { ink: "ink-soft" }),
  ];
}
