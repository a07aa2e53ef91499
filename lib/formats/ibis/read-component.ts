import type { IbisComponent, IbisDocument, IbisSelector, Triple } from "./document";
import { excerpt } from "./problem";
import { split, type BlockReader } from "./rows";

const PACKAGE = { r_pkg: "resistance", l_pkg: "inductance", c_pkg: "capacitance" } as const;
const MISSING: Triple = { typ: null, min: null, max: null, line: 0 };

export function newComponent(reader: BlockReader): IbisComponent {
  const { rest, line } = reader.block;
  if (rest === "") reader.refuse(line, "The component has no name. Write it beside the keyword.");
  return {
    name: rest,
    line,
    package: { resistance: null, inductance: null, capacitance: null },
    pins: [],
    differential: [],
  };
}

export function readPackage(component: IbisComponent, reader: BlockReader): void {
  for (const { text, number } of reader.block.lines) {
    const [name = "", ...cells] = split(text);
    const field = PACKAGE[name.toLowerCase() as keyof typeof PACKAGE];
    if (field) component.package[field] = reader.triple(cells, number);
    else
      reader.warn(
        number,
        `'${excerpt(name)}' is no value of a package. R_pkg, L_pkg and C_pkg are; it was left out.`,
      );
  }
  for (const [name, field] of Object.entries(PACKAGE))
    if (!component.package[field])
      reader.refuse(
        reader.block.line,
        `${name.replace(/^./, (c) => c.toUpperCase())} is missing; no package value is known. Add its line.`,
      );
}

/** `[Pin] signal_name model_name R_pin L_pin C_pin`; the order of the last three is the heading's. */
export function readPins(component: IbisComponent, reader: BlockReader): void {
  const order = split(reader.block.rest.toLowerCase()).slice(2);
  const at = (name: string, usual: number) => (order.includes(name) ? order.indexOf(name) + 3 : usual);
  const [r, l, c] = [at("r_pin", 3), at("l_pin", 4), at("c_pin", 5)];
  const seen = new Set(component.pins.map(({ pin }) => pin));
  for (const { text, number: line } of reader.block.lines) {
    const cells = text.split(/\s+/);
    const [pin = "", signal = "", model = ""] = cells;
    if (model === "") {
      reader.refuse(
        line,
        `Pin ${excerpt(pin)} has no signal or no model; it was left out. Write NC where there is none.`,
      );
      continue;
    }
    if (seen.has(pin)) {
      reader.warn(line, `Pin ${excerpt(pin)} is listed twice; the first was kept.`);
      continue;
    }
    seen.add(pin);
    component.pins.push({
      pin,
      signal,
      model,
      resistance: reader.number(cells[r], line),
      inductance: reader.number(cells[l], line),
      capacitance: reader.number(cells[c], line),
      line,
    });
  }
  if (component.pins.length === 0)
    reader.refuse(reader.block.line, "Lists no pin. A component needs one at least.");
}

/** `[Diff Pin] inv_pin vdiff tdelay_typ tdelay_min tdelay_max` */
export function readDifferential(component: IbisComponent, reader: BlockReader): void {
  const pins = new Set(component.pins.map(({ pin }) => pin));
  for (const { text, number: line } of reader.block.lines) {
    const [pin = "", inverting = "", vdiff, ...delays] = text.split(/\s+/);
    if (inverting === "") {
      reader.refuse(line, "Names one pin only; a pair has two. It was left out.");
      continue;
    }
    for (const name of [pin, inverting])
      if (!pins.has(name)) reader.warn(line, `Pin ${excerpt(name)} is not in the pin list.`);
    const [typ, min, max] = [0, 1, 2].map((i) => reader.number(delays[i], line) ?? null);
    component.differential.push({
      pin,
      inverting,
      threshold: reader.number(vdiff, line),
      delay: { ...MISSING, typ: typ ?? null, min: min ?? null, max: max ?? null, line },
      line,
    });
  }
}

export function readSelector(document: IbisDocument, reader: BlockReader): void {
  const { rest, line, lines } = reader.block;
  const selector: IbisSelector = { name: rest, line, choices: [] };
  for (const { text, number } of lines) {
    const [model = "", ...words] = text.split(/\s+/);
    selector.choices.push({ model, description: words.join(" "), line: number });
  }
  if (rest === "" || selector.choices.length === 0)
    reader.refuse(
      line,
      "Has no name or offers no model. Write its name beside the keyword and one model a line.",
    );
  else document.selectors.push(selector);
}
