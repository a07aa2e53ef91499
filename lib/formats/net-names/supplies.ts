export interface ScopeProposal {
  net: string;
  kind: "power" | "ground" | "static" | "test";
  reason: string;
  /** The name leaves little doubt; others are offered unticked. */
  sure: boolean;
}

/** A net named after a supply but carrying a signal about it ("3V3_PG", "VCC_EN"). */
const ABOUT_A_SUPPLY =
  /[_-](en|ena|enable|pg|pgood|good|ok|fb|feedback|sns|sense|mon|monitor|flt|fault|alert|ctrl|rst|reset|int|irq|sel|adj|trim|scl|sda)(_?[nb]|\*|#)?$/i;
const VOLTS = /^[+-]?[pnv]?_?\d{1,3}(v\d{0,3}|\.\d{1,3}v|v)([_-].*|[a-z]{0,2})?$/i;
const SUPPLY =
  /^[+-]?(p?[adp]?v(cc|dd|ee|pp)|v(tt|ref|core|bat|batt|bus|in|out|sys|io|aux|int|main|logic|rtc|pll|mem)|vl|vm|pvin|avcc|avdd|dvdd|hv|hvdd|lvdd|ovdd|gvdd|xvdd|svdd)([\d_.-].*|[a-z]{0,4}\d{0,2}([_-].*)?)?$/i;
const GROUND =
  /^(([adpscei]|ana|dig|pwr|chassis|shield|earth|iso|sig)?[_-]?gnd([\d_.-].*|[a-z]{0,3})|vss[adioq]?\d{0,2}|vss([_-].*)?|0v|earth|chassis|shield|pe|com_gnd)$/i;
const UNCONNECTED = /^(unused|nc|n\/c|no[_ -]?connect|unconnected|dnc)([\d_\-( ].*)?$/i;
const TEST = /^(tp\d*|testpoint\d*|test|test[_-].*|.*[_-]tp\d*|.*(^|[_-])scan([_-].*)?)$/i;
const STATIC = /^(.*[_-])?(strap|cfg|config|boot|bootsel|mode|addr_?sel|id_?sel|wp|pwrok)\d*([_-]?[nb])?$/i;

/** Nets that a reflection check leaves out, by their names (habits of the trade, no source). */
export function proposeOutOfScope(names: readonly string[]): ScopeProposal[] {
  const proposals: ScopeProposal[] = [];
  for (const net of names) {
    const proposal = readOne(net);
    if (proposal) proposals.push(proposal);
  }
  return proposals;
}

function readOne(net: string): ScopeProposal | null {
  const name = net.replace(/^[/\\]+/, "").trim();
  const of = (kind: ScopeProposal["kind"], reason: string, sure: boolean) => ({ net, kind, reason, sure });
  if (UNCONNECTED.test(name)) return of("static", "not connected, by its name", true);
  if (!ABOUT_A_SUPPLY.test(name)) {
    if (GROUND.test(name)) return of("ground", "ground, by its name", true);
    if (VOLTS.test(name)) return of("power", "a voltage, by its name", true);
    if (SUPPLY.test(name)) return of("power", "a supply, by its name", true);
  }
  if (TEST.test(name)) return of("test", "for test, by its name", false);
  if (STATIC.test(name)) return of("static", "set once at start, by its name", false);
  return null;
}
