import "server-only";
import { randomUUID } from "node:crypto";
import { ZodError } from "zod";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { EngineError } from "@/lib/si/errors";
import { log } from "./log";

export interface ErrorBody {
  error: {
    code: string;
    message: string;
    fields?: Record<string, string>;
    current?: unknown;
    changed?: string[];
    detail?: unknown;
  };
}

export function errorResponse(status: number, error: ErrorBody["error"], headers?: HeadersInit): Response {
  return Response.json({ error } satisfies ErrorBody, { status, headers: { "cache-control": "no-store", ...headers } });
}

/** Every error as one sentence with a way out; what nobody foresaw gets a number that the log knows too. */
export function toErrorResponse(error: unknown): Response {
  if (error instanceof NotFoundError) return errorResponse(404, { code: "not-found", message: error.message });
  if (error instanceof ConflictError)
    return errorResponse(409, { code: "conflict", message: error.message, current: error.current, changed: error.changed });
  if (error instanceof RefusedError)
    return errorResponse(422, { code: error.code, message: error.message, fields: error.fields, detail: error.detail });
  if (error instanceof ZodError) return invalid(error);
  if (error instanceof EngineError)
    return errorResponse(422, {
      code: error.code,
      message: error.message,
      fields: error.field ? { [error.field]: error.message } : {},
    });
  const reference = randomUUID();
  log.error({ err: error, reference }, "a request failed for a reason nobody foresaw");
  return errorResponse(500, {
    code: "internal",
    message: `The server failed and nothing was changed. Try again; if it stays so, give the operator the number ${reference}.`,
  });
}

/** 400 with each field's first complaint; paths are joined by dots, as forms name their fields. */
export function invalid(error: ZodError): Response {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) fields[issue.path.join(".")] ??= issue.message;
  const [[place, message] = ["", "The request is not in the form expected."]] = Object.entries(fields);
  return errorResponse(400, { code: "invalid", message: place ? `${place}: ${message}` : message, fields });
}
