import type { BoardDraft } from "./draft";
import type { XmlElement } from "./scan-xml";

const SHOWN = 40;

/** An attribute's text without blanks around; "" where it is not given. */
export function text(element: XmlElement, name: string, max = 120): string {
  return (element.attributes[name] ?? "").trim().slice(0, max);
}

/**
 * A number that an element must give. Null, with the problem told, where it is missing or is none.
 *
 * @param limit the greatest magnitude that makes sense, in the attribute's own unit
 */
export function number(
  draft: BoardDraft,
  element: XmlElement,
  name: string,
  limit = Infinity,
): number | null {
  const said = element.attributes[name];
  if (said === undefined || said.trim() === "") {
    draft.problem(element.line, element.name, `gives no ${name}; left out.`);
    return null;
  }
  const value = Number(said);
  if (!Number.isFinite(value)) {
    draft.problem(
      element.line,
      element.name,
      `gives ${name} as '${said.slice(0, SHOWN)}', which is no number; left out.`,
    );
    return null;
  }
  if (Math.abs(value) > limit) {
    draft.problem(
      element.line,
      element.name,
      `gives ${name} as ${said.slice(0, SHOWN)}, farther than any board reaches; left out.`,
    );
    return null;
  }
  return value;
}

/** A number that an element may give; null where it does not, or gives none. */
export function optionalNumber(element: XmlElement, name: string): number | null {
  const said = element.attributes[name];
  if (said === undefined || said.trim() === "") return null;
  const value = Number(said);
  return Number.isFinite(value) ? value : null;
}

/** No board reaches farther than 10 m from its origin. */
export const REACH_M = 10;

/** A place on the board [m]. */
export function place(
  draft: BoardDraft,
  element: XmlElement,
  xName = "x",
  yName = "y",
): { x: number; y: number } | null {
  const reach = REACH_M / draft.metres;
  const x = number(draft, element, xName, reach);
  const y = x === null ? null : number(draft, element, yName, reach);
  return x === null || y === null ? null : { x: x * draft.metres, y: y * draft.metres };
}

export function flag(element: XmlElement, name: string): boolean {
  return /^(true|1|yes)$/i.test(element.attributes[name] ?? "");
}

/** The net that an attribute names; null for none, and for the words by which exporters say so. */
export function netName(said: string | undefined): string | null {
  const name = (said ?? "").trim();
  return name === "" || /^\W*(no[ _-]?net|none|unconnected|nc)\W*$/i.test(name) ? null : name;
}
