import "server-only";
import type { z } from "zod";
import { NotFoundError } from "@/lib/schemas/errors";
import { baseUrl } from "./environment";
import { invalidInput, RequestError } from "./route-errors";

const READ_METHODS = new Set(["GET", "HEAD", "OPTIONS"]);

export const isWrite = (request: Request): boolean => !READ_METHODS.has(request.method);

/**
 * Writes come from our own pages. A browser says where a request comes from and no page can forge that; a client
 * that is no browser says nothing, and carries nobody's cookies but its own.
 * @throws RequestError 403
 */
export function requireSameOrigin(request: Request): void {
  const site = request.headers.get("sec-fetch-site");
  const origin = request.headers.get("origin");
  const foreignSite = site !== null && site !== "same-origin";
  if (foreignSite || (origin !== null && !isOwnOrigin(origin, request)))
    throw new RequestError(403, {
      code: "foreign-origin",
      message:
        "This request came from another site, so nothing was done. Open the page here and do it again.",
    });
}

function isOwnOrigin(origin: string, request: Request): boolean {
  if (origin === new URL(baseUrl()).origin) return true;
  return URL.canParse(origin) && new URL(origin).host === request.headers.get("host");
}

/** An address that names nothing we could have made is an address of nothing. */
export function readParams<T extends z.ZodType>(schema: T, params: unknown): z.output<T> {
  const parsed = schema.safeParse(params);
  if (!parsed.success) throw new NotFoundError();
  return parsed.data;
}

/** A name given twice becomes a list. */
export function readQuery<T extends z.ZodType>(schema: T, request: Request): z.output<T> {
  const search = new URL(request.url).searchParams;
  const query: Record<string, string | string[]> = {};
  for (const name of new Set(search.keys())) {
    const values = search.getAll(name);
    query[name] = values.length > 1 ? values : (values[0] ?? "");
  }
  const parsed = schema.safeParse(query);
  if (!parsed.success) throw invalidInput(parsed.error);
  return parsed.data;
}

export async function readJson<T extends z.ZodType>(
  schema: T,
  request: Request,
  maxBytes: number,
): Promise<z.output<T>> {
  const type = request.headers.get("content-type") ?? "";
  if (!/^application\/json\b/i.test(type))
    throw new RequestError(415, {
      code: "not-json",
      message: "Send this as JSON (content-type application/json).",
    });
  const parsed = schema.safeParse(parseJson(await readBytes(request, maxBytes)));
  if (!parsed.success) throw invalidInput(parsed.error);
  return parsed.data;
}

/**
 * The body, counted as it arrives: what the header says of its length may be a lie.
 * @throws RequestError 413
 */
export async function readBytes(request: Request, maxBytes: number): Promise<Uint8Array<ArrayBuffer>> {
  if (Number(request.headers.get("content-length") ?? 0) > maxBytes) throw tooLarge(maxBytes);
  const parts: Uint8Array[] = [];
  let size = 0;
  const reader = request.body?.getReader();
  for (;;) {
    const next = await reader?.read();
    if (!next || next.done) break;
    size += next.value.byteLength;
    if (size > maxBytes) {
      await reader?.cancel();
      throw tooLarge(maxBytes);
    }
    parts.push(next.value);
  }
  const bytes = new Uint8Array(size);
  let at = 0;
  for (const part of parts) {
    bytes.set(part, at);
    at += part.byteLength;
  }
  return bytes;
}

function parseJson(bytes: Uint8Array): unknown {
  try {
    return JSON.parse(new TextDecoder("utf-8", { fatal: true }).decode(bytes));
  } catch {
    throw new RequestError(400, {
      code: "invalid",
      message: "What was sent is not JSON in UTF-8.",
      fields: {},
    });
  }
}

function tooLarge(maxBytes: number): RequestError {
  const limit =
    maxBytes >= 1_048_576 ? `${Math.floor(maxBytes / 1_048_576)} MiB` : `${Math.floor(maxBytes / 1024)} KiB`;
  return new RequestError(413, {
    code: "too-large",
    message: `This is more than the server takes at once (${limit}). Send it in parts.`,
  });
}
