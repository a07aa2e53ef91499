/** Answers that are kept; beyond this many the oldest goes. */
const KEPT = 4_000;
const kept = new Map<string, unknown>();

/**
 * What `compute` gives, once for each key: layers of one construction share their solutions, whatever asks for them.
 * What throws is not kept.
 */
export function remembered<T>(key: readonly unknown[], compute: () => T): T {
  const text = JSON.stringify(key, rounded);
  if (kept.has(text)) return kept.get(text) as T;
  const value = compute();
  kept.set(text, value);
  if (kept.size > KEPT) kept.delete(kept.keys().next().value ?? "");
  return value;
}

/** Mirrored layers differ in the last bit of their sums. */
function rounded(_key: string, value: unknown): unknown {
  return typeof value === "number" ? Number(value.toPrecision(11)) : value;
}
