import type { StoredNet } from "@/lib/schemas/net";

const GROUND =
  /^(?:[ADPS]|CH|SIG|PWR|CHASSIS_?|EARTH_?)?(?:GND|VSS)(?:[AD]|IO)?(?:[_-][A-Z0-9]{1,12}|\d{1,2})?$|^0V0?$|^EARTH$|^CHASSIS$/i;
/** "+3V3", "1V8", "VCC_3V3", "VDD1.8", "3.3V", "-5V", "+12V_SENS": the whole name says a voltage. */
const VOLTS =
  /^(?:(?:[ADP]?V(?:CC|DD)?[A-Z]{0,4}|PWR|PP?)[_-]?)?([+-]?)(\d{1,3})(?:V(\d{0,3})|[.P](\d{1,3})V|(?<=VDD\d|VCC\d|VDD_\d|VCC_\d)\.(\d{1,3}))(?:[_-]?(?:[A-Z]{1,6}\d{0,2}|\d{1,2}))?$/i;
/** A supply by its name, whose voltage the name does not say. */
const SUPPLY =
  /^[+-]?(?:[ADP]?V(?:CC|DD|EE|PP|BAT|IN|TT|BUS|REF|SYS)[A-Z]{0,3}\d{0,2}|V[CD]{2}[_-](?:IO|CORE|PLL|ANA|DIG))$/i;
/** "3V3_EN", "1V8_PGOOD": a control line of a supply, not the supply. */
const CONTROL = /[_-](?:EN|PG|PGOOD|PWRGD|OK|FB|ON|OFF|FLT|FAULT|SNS|SENSE|MON|DET|RST|ALERT)$/i;

/** Whether a net's whole name is that of a supply or of ground ("3V3_EN" is not). */
export function looksLikeRail(name: string): boolean {
  const plain = name.trim();
  return GROUND.test(plain) || (!CONTROL.test(plain) && (VOLTS.test(plain) || SUPPLY.test(plain)));
}

/**
 * The voltage that a rail's name says: "+3V3" 3.3, "1V8_IO" 1.8, "-5V" −5, "GND" 0.
 * @returns [V], or null where the name says none
 */
export function railVoltage(name: string): number | null {
  const plain = name.trim();
  if (GROUND.test(plain)) return 0;
  const match = CONTROL.test(plain) ? null : VOLTS.exec(plain);
  if (!match) return null;
  const [, sign, whole, afterV, afterPoint, bare] = match;
  const volts = Number(`${whole}.${afterV || afterPoint || bare || "0"}`);
  return sign === "-" ? -volts : volts;
}

/** Power and ground nets: never joined into a path, whatever a part connects to them. */
export function isRail(net: Pick<StoredNet, "name" | "scopeKind">): boolean {
  return net.scopeKind === "power" || net.scopeKind === "ground" || looksLikeRail(net.name);
}
