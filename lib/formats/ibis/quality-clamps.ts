import { columnPoints } from "./corners";
import type { IbisModel } from "./document";
import { currentAt } from "./iv-tables";
import type { IbisFinding } from "./quality";
import { percent } from "./quality-tables";

/** A switch passes no more beyond its rail than this many times what it passes at the rail's other side. */
const OWN_STRENGTH = 5;
/** From this share of the clamp's current on, the switch's table holds it too. */
const SAME = 0.6;

/**
 * The current of a clamp is meant to be in its own table only. Where a pullup or pulldown carries the clamp's current
 * too, beyond the rail, the clamp counts twice while the pin drives.
 */
export function doubleCountedClamps(model: IbisModel): IbisFinding[] {
  const supply = model.voltageRange?.typ ?? null;
  if (supply === null || supply <= 0) return [];
  const found: IbisFinding[] = [];
  for (const [switchName, clampName, words] of [
    ["pulldown", "gndClamp", "[Pulldown] below ground and [GND Clamp]"],
    ["pullup", "powerClamp", "[Pullup] above its supply and [POWER Clamp]"],
  ] as const) {
    const switched = model.tables[switchName];
    const clamp = model.tables[clampName];
    if (!switched || !clamp) continue;
    const own = columnPoints(switched.rows, "typical");
    const other = columnPoints(clamp.rows, "typical");
    // Both count from the same rail; beyond it is x < 0 for either.
    const beyond = -Math.min(
      supply,
      0.98 * Math.max(-(own[0]?.[0] ?? 0), 0),
      Math.max(-(other[0]?.[0] ?? 0), 0),
    );
    if (beyond > -0.5) continue;
    const inSwitch = Math.abs(currentAt(own, beyond));
    const inClamp = Math.abs(currentAt(other, beyond));
    const within = Math.abs(currentAt(own, -beyond));
    if (inClamp < 1e-3 || inSwitch < SAME * inClamp || inSwitch < OWN_STRENGTH * within) continue;
    found.push({
      check: "double-counted clamp",
      severity: "warning",
      model: model.name,
      line: switched.line,
      reason: `${words} both carry the clamp: at ${beyond.toFixed(2)} V the switch has ${percent(inSwitch / inClamp)} of the clamp's current, so it counts twice while driving. Take the clamp off the switch's table.`,
    });
  }
  return found;
}
