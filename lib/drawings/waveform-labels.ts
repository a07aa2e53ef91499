import type { Domain, PlotBox, Scale } from "./axis";
import { circle, type Mark, polyline, text } from "./marks";
import { voltsText } from "./number-text";
import { spreadLabels } from "./spread-labels";
import { textWidth } from "./text-width";
import { voltsAt } from "./wave-samples";
import { waveStyle } from "./wave-style";
import type { LimitLine, WaveProbe } from "./waveform-chart.geometry";
import type { Violation } from "./waveform-violations";

export const LABEL = 12;
const ROW = 15;
/** How far a note may stand from its point. */
const AWAY = [0, ROW, 2 * ROW, 3 * ROW, 4 * ROW, 5 * ROW];

/** Each limit's name on its outer side, at the left, where waves have not yet started to ring. */
export function limitNames(
  limits: readonly LimitLine[],
  violations: readonly Violation[],
  x: Scale,
  y: Scale,
  box: PlotBox,
): Mark[] {
  const wanted = limits.map((l) => y(l.volts) + (l.side === "max" ? -10 : 10));
  const rows = spreadLabels(wanted, ROW, box.top, box.bottom);
  return limits.map((l, i) => {
    const broken = violations.some((v) => v.limit === l.id);
    const from = Math.min(Math.max(l.from === undefined ? box.left : x(l.from), box.left), box.right - 160);
    return text(from + 8, (rows[i] ?? 0) + 4, `${l.label} ${voltsText(l.volts)}`, {
      ink: l.reference ? "ink-soft" : "fail",
      weight: broken ? 650 : 400,
      halo: true,
    });
  });
}

/** How far past the limit, at the worst point of each limit, clear of the names already placed. */
export function worstNotes(
  violations: readonly Violation[],
  x: Scale,
  y: Scale,
  box: PlotBox,
  names: readonly Mark[],
): Mark[] {
  const worst = new Map<string, Violation>();
  for (const v of violations) {
    const known = worst.get(v.limit);
    if (!known || v.worst.past > known.worst.past) worst.set(v.limit, v);
  }
  const taken = names.flatMap(roomOf);
  return [...worst.values()].flatMap((v) => {
    const [cx, cy] = [x(v.worst.time), y(v.worst.volts)];
    const note = placed(`${voltsText(v.worst.past)} past`, cx, cy, v.side === "max", box, taken);
    taken.push(...roomOf(note));
    return [circle(cx, cy, 3, { fill: "fail" }), note];
  });
}

/** The first place by the point where the note fits the plot and covers nothing; the outer side is tried first. */
function placed(
  words: string,
  cx: number,
  cy: number,
  above: boolean,
  box: PlotBox,
  taken: readonly Room[],
): Mark {
  const outward = above ? -1 : 1;
  const outer = above ? cy - 7 : cy + 17;
  const inner = above ? cy + 17 : cy - 7;
  const rows = AWAY.flatMap((away) => [outer + outward * away, inner - outward * away]);
  const at = (row: number, anchor: "start" | "end") =>
    text(cx + (anchor === "start" ? 8 : -8), Math.min(Math.max(row, box.top + 11), box.bottom - 4), words, {
      ink: "fail",
      weight: 650,
      anchor,
      halo: true,
    });
  const notes = rows.flatMap((row) => [at(row, "start"), at(row, "end")]);
  const fits = (note: Mark) =>
    roomOf(note).every(
      (room) => room.left >= box.left && room.right <= box.right && !taken.some((other) => meet(room, other)),
    );
  return notes.find(fits) ?? at(outer, cx > (box.left + box.right) / 2 ? "end" : "start");
}

interface Room {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

function roomOf(mark: Mark): Room[] {
  if (mark.kind !== "text") return [];
  const width = textWidth(mark.spans.map((span) => span.text).join(""), LABEL, (mark.weight ?? 400) > 500);
  const left = mark.anchor === "end" ? mark.x - width : mark.x;
  return [{ left, right: left + width, top: mark.y - LABEL, bottom: mark.y + 3 }];
}

const meet = (a: Room, b: Room) =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

/** The name of each wave at its end, moved apart where ends meet. */
export function endNames(
  probes: readonly WaveProbe[],
  focus: string,
  span: Domain,
  y: Scale,
  box: PlotBox,
): Mark[] {
  const ends = probes.flatMap((p) => {
    const v = voltsAt(p, span[1]);
    return v === null ? [] : [{ p, y: Math.min(Math.max(y(v), box.top), box.bottom) }];
  });
  const rows = spreadLabels(
    ends.map((e) => e.y),
    ROW,
    box.top,
    box.bottom,
  );
  return ends.flatMap(({ p, y: at }, i) => {
    const row = rows[i] ?? at;
    const style = waveStyle(p.role, p.id === focus);
    return [
      polyline(
        [
          [box.right + 1, at],
          [box.right + 6, at],
          [box.right + 12, row],
        ],
        { ...style, weight: 1 },
      ),
      text(box.right + 15, row + 4, p.label, { ink: style.stroke, weight: p.id === focus ? 650 : 400 }),
    ];
  });
}
