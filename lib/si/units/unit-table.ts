import { Decimal } from "./decimal";
import type { Dimension } from "./quantity";

export interface UnitDefinition {
  /** How it is written on screen and stored. */
  unit: string;
  dimension: Dimension;
  /** SI units in one of it, exact (or to 60 digits where it does not terminate). */
  factor: Decimal;
  /** Other spellings, as they stand. */
  aliases: readonly string[];
  /** Lower-case spellings met when the text is all upper or all lower case ("MM", "mhz"). */
  folded: readonly string[];
}

/**
 * Thickness of one ounce per square foot of copper foil [m].
 *
 * 1 oz/ft² = 305.15 g/m², nominal area weight 305 g/m²; the nominal thickness that goes with it is 34.3 µm
 * (a foil density of 8.89 g/cm³; solid copper of 8.93 g/cm³ would give 34.2 µm).
 * Source: IPC-4562 foil designator 1, from memory. The factor is linear in the weight.
 */
export const METRES_PER_OUNCE = new Decimal("34.3e-6");
/** Nominal area weight of one ounce foil [g/m²]. */
const GRAMS_PER_OUNCE = 305;

const define = (
  dimension: Dimension,
  unit: string,
  factor: string | Decimal,
  aliases = "",
  folded = unit.toLowerCase(),
): UnitDefinition => ({
  unit,
  dimension,
  factor: new Decimal(factor),
  aliases: aliases
    .split(" ")
    .filter(Boolean)
    .map((alias) => alias.replace(/_/g, " ")),
  folded: folded.split(" ").filter(Boolean),
});

/** Micro is written µ (U+00B5); the Greek letter and "u" are folded into it before look-up, as is the ohm sign. */
export const unitTable: readonly UnitDefinition[] = [
  define("length", "m", "1", "metre metres meter meters", "metre metres meter meters"),
  define("length", "cm", "0.01"),
  define("length", "mm", "1e-3", "millimetre millimetres millimeter millimeters", "mm"),
  define("length", "µm", "1e-6", "micron microns", "µm micron microns"),
  define("length", "nm", "1e-9"),
  define("length", "mil", "25.4e-6", "mils thou th", "mil mils thou"),
  define("length", "in", "0.0254", 'inch inches " ″ in.', "in inch inches"),
  define("length", "ft", "0.3048", "foot feet"),
  define(
    "length",
    "oz",
    METRES_PER_OUNCE,
    "oz/ft² oz/ft2 oz/ft^2 oz_Cu oz/sq_ft ounce ounces oz.",
    "oz oz/ft² oz/ft2",
  ),
  define("length", "g/m²", METRES_PER_OUNCE.div(GRAMS_PER_OUNCE), "g/m2 g/m^2", "g/m² g/m2"),

  define("time", "s", "1", "sec", "s sec"),
  define("time", "ms", "1e-3"),
  define("time", "µs", "1e-6"),
  define("time", "ns", "1e-9"),
  define("time", "ps", "1e-12"),
  define("time", "fs", "1e-15"),

  define("resistance", "mΩ", "1e-3", "mohm mR mOhm", ""),
  define("resistance", "Ω", "1", "ohm ohms Ohm Ohms R r", "ohm ohms"),
  define("resistance", "kΩ", "1e3", "k K kohm kOhm kR KΩ", "kohm kohms"),
  define("resistance", "MΩ", "1e6", "M Mohm MOhm MR Meg meg", ""),

  define("capacitance", "F", "1", "", "f"),
  define("capacitance", "mF", "1e-3", "", ""),
  define("capacitance", "µF", "1e-6", "µ", "µf"),
  define("capacitance", "nF", "1e-9", "n", "nf"),
  define("capacitance", "pF", "1e-12", "p", "pf"),
  define("capacitance", "fF", "1e-15", "", ""),

  define("inductance", "H", "1", "", "h"),
  define("inductance", "mH", "1e-3", "", ""),
  define("inductance", "µH", "1e-6", "µ", "µh"),
  define("inductance", "nH", "1e-9", "n", "nh"),
  define("inductance", "pH", "1e-12", "p", "ph"),

  define("voltage", "V", "1", "volt volts", "v"),
  define("voltage", "mV", "1e-3", "", ""),
  define("voltage", "µV", "1e-6", "", ""),
  define("voltage", "kV", "1e3", "", "kv"),

  define("current", "A", "1", "amp amps", "a"),
  define("current", "mA", "1e-3", "", ""),
  define("current", "µA", "1e-6", "", ""),
  define("current", "nA", "1e-9", "", ""),

  define("frequency", "Hz", "1"),
  define("frequency", "kHz", "1e3"),
  define("frequency", "MHz", "1e6"),
  define("frequency", "GHz", "1e9"),
  define("frequency", "THz", "1e12"),

  define("bitRate", "b/s", "1", "bit/s bps bd Bd", "bps bit/s"),
  define("bitRate", "kb/s", "1e3", "kbit/s kbps", "kbps kbit/s"),
  define("bitRate", "Mb/s", "1e6", "Mbit/s Mbps MT/s MBd", "mbps mbit/s mt/s"),
  define("bitRate", "Gb/s", "1e9", "Gbit/s Gbps GT/s GBd", "gbps gbit/s gt/s"),

  define("ratio", "1", "1", "×", ""),
  define("ratio", "%", "0.01", "percent pct", "percent"),
  define("ratio", "‰", "0.001", "", ""),
  define("ratio", "ppm", "1e-6"),

  define("power", "W", "1", "", "w"),
  define("power", "mW", "1e-3", "", ""),

  define("delayPerLength", "s/m", "1"),
  define("delayPerLength", "ns/m", "1e-9"),
  define("delayPerLength", "ps/mm", "1e-9"),
  define("delayPerLength", "ps/cm", "1e-10"),
  define("delayPerLength", "ps/in", new Decimal("1e-12").div("0.0254"), "ps/inch"),
  define("delayPerLength", "ns/in", new Decimal("1e-9").div("0.0254"), "ns/inch"),

  define("slewRate", "V/s", "1"),
  define("slewRate", "V/µs", "1e6"),
  define("slewRate", "V/ns", "1e9"),
  define("slewRate", "mV/ps", "1e9", "", ""),

  define("voltageTime", "V·s", "1", "Vs V*s", ""),
  define("voltageTime", "V·ns", "1e-9", "Vns V*ns V-ns", ""),
  define("voltageTime", "V·ps", "1e-12", "Vps V*ps V-ps", ""),
  define("voltageTime", "mV·ns", "1e-12", "mVns mV*ns", ""),
];
