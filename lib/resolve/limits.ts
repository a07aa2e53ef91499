import type { ResolvedLimit } from "@/lib/si/path/types";
import { ruleCatalogue } from "@/lib/si/rules/catalogue";
import type { StoredNet } from "@/lib/schemas/net";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { StoredRuleSet } from "@/lib/schemas/rule-set";

type Limits = Record<string, ResolvedLimit>;

/** Limits by rule: a net's own over its class's over the project's over the default; each says where it comes from. */
export class LimitResolver {
  private readonly byClass = new Map<string, Limits>();

  constructor(private readonly ruleSet: StoredRuleSet) {}

  of(nets: StoredNet[], netClass: StoredNetClass | null, flightTimeMax: number | null): Limits {
    const base = this.ofClass(netClass, flightTimeMax);
    const overrides = nets.flatMap((net) => Object.entries(net.limits));
    if (overrides.length === 0) return base;
    const merged = { ...base };
    for (const [rule, override] of overrides) {
      const current = merged[rule];
      if (!current || current.origin === "net") continue;
      const limit = decimal(override.limit);
      merged[rule] = { ...current, enabled: override.enabled, limit: limit ?? current.limit, origin: "net" };
    }
    return merged;
  }

  private ofClass(netClass: StoredNetClass | null, flightTimeMax: number | null): Limits {
    const key = netClass?.lineageId ?? "";
    let limits = this.byClass.get(key);
    if (!limits) this.byClass.set(key, (limits = this.resolve(netClass, flightTimeMax)));
    return limits;
  }

  private resolve(netClass: StoredNetClass | null, flightTimeMax: number | null): Limits {
    const limits: Limits = {};
    for (const rule of ruleCatalogue) {
      const project = this.ruleSet.rules[rule.id];
      const projectLimit = decimal(project?.limit ?? null);
      const entry: ResolvedLimit = {
        enabled: project?.enabled ?? rule.enabledByDefault,
        limit: projectLimit ?? rule.defaultLimit,
        severity: project?.severity ?? rule.severity,
        origin: projectLimit !== null && projectLimit !== rule.defaultLimit ? "project" : "default",
      };
      if (rule.id === "flight-time" && flightTimeMax !== null)
        Object.assign(entry, { limit: flightTimeMax * 1e12, origin: "class" });
      const override = netClass?.limits[rule.id];
      if (override) {
        entry.enabled = override.enabled;
        entry.limit = decimal(override.limit) ?? entry.limit;
        entry.origin = "class";
      }
      limits[rule.id] = entry;
    }
    return limits;
  }
}

function decimal(text: string | null): number | null {
  if (text === null || text.trim() === "") return null;
  const value = Number(text);
  return Number.isFinite(value) ? value : null;
}
