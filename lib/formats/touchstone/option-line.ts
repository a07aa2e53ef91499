import { TouchstoneError, type NumberFormat, type ParameterKind } from "./document";

export interface Options {
  /** [Hz] per unit of the file */
  scale: number;
  kind: ParameterKind;
  format: NumberFormat;
  /** [Ω] */
  resistance: number;
}

const UNITS: Readonly<Record<string, number>> = { HZ: 1, KHZ: 1e3, MHZ: 1e6, GHZ: 1e9 };
const KINDS = ["S", "Y", "Z", "G", "H"] as const satisfies readonly ParameterKind[];
const FORMATS = ["RI", "MA", "DB"] as const satisfies readonly NumberFormat[];

/** What holds where the option line is silent. */
export const DEFAULT_OPTIONS: Options = { scale: 1e9, kind: "S", format: "MA", resistance: 50 };

/** `# GHZ S RI R 50`, in any order and case. @throws TouchstoneError for words it does not know */
export function readOptionLine(text: string, line: number): Options {
  const options = { ...DEFAULT_OPTIONS };
  const words = text.slice(1).trim().toUpperCase().split(/\s+/).filter(Boolean);
  for (let i = 0; i < words.length; i++) {
    const word = words[i]!;
    const kind = KINDS.find((one) => one === word);
    const format = FORMATS.find((one) => one === word);
    const unit = UNITS[word];
    if (kind) options.kind = kind;
    else if (format) options.format = format;
    else if (unit !== undefined) options.scale = unit;
    else if (word === "R") {
      const value = Number(words[++i]);
      if (!(value > 0 && Number.isFinite(value)))
        throw new TouchstoneError(line, "R needs a resistance above zero. Write it as R 50.");
      options.resistance = value;
    } else
      throw new TouchstoneError(
        line,
        `'${word.slice(0, 40)}' is unknown in an option line. Write one such as # GHz S RI R 50.`,
      );
  }
  return options;
}
