/** Thrown when a value has no canonical form; `path` says where, for example `$.nets[3].length`. */
export class CanonicalJsonError extends Error {
  override readonly name = "CanonicalJsonError";
  constructor(
    readonly path: string,
    what: string,
  ) {
    super(`${path} is ${what}, which has no place in a record. Leave it out or write null.`);
  }
}

/**
 * JSON in one fixed spelling, so that equal values give equal bytes: keys in code-unit order, no white
 * space, numbers to 12 significant digits but safe integers whole (times, sizes), −0 as 0, keys that hold `undefined` left out, typed number
 * arrays as arrays. Hashes, snapshots and reports are made of it.
 *
 * @throws CanonicalJsonError for NaN, infinities, undefined inside arrays, functions, bigints, class instances
 */
export function canonicalJson(value: unknown): string {
  return write(value, "$");
}

function write(value: unknown, path: string): string {
  if (value === null) return "null";
  switch (typeof value) {
    case "string":
      return JSON.stringify(value);
    case "number":
      return number(value, path);
    case "boolean":
      return value ? "true" : "false";
    case "object":
      return Array.isArray(value) || isNumberArray(value) ? list(value, path) : record(value, path);
    default:
      throw new CanonicalJsonError(path, typeof value);
  }
}

function number(value: number, path: string): string {
  if (Number.isSafeInteger(value)) return value === 0 ? "0" : String(value);
  if (!Number.isFinite(value))
    throw new CanonicalJsonError(path, Number.isNaN(value) ? "not a number" : "infinite");
  return String(Number(value.toPrecision(12)));
}

function list(values: ArrayLike<unknown>, path: string): string {
  let text = "[";
  for (let i = 0; i < values.length; i++) text += (i ? "," : "") + write(values[i], `${path}[${i}]`);
  return `${text}]`;
}

function record(value: object, path: string): string {
  const prototype: unknown = Object.getPrototypeOf(value);
  if (prototype !== Object.prototype && prototype !== null)
    throw new CanonicalJsonError(path, `a ${value.constructor?.name || "class instance"}`);
  const entries = value as Record<string, unknown>;
  let text = "";
  for (const key of Object.keys(entries).sort()) {
    const item = entries[key];
    if (item === undefined) continue;
    text += `${text ? "," : ""}${JSON.stringify(key)}:${write(item, `${path}.${key}`)}`;
  }
  return `{${text}}`;
}

function isNumberArray(value: object): value is Float64Array {
  return value instanceof Float64Array || value instanceof Float32Array || value instanceof Int32Array;
}
