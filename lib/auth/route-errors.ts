import "server-only";
import { randomUUID } from "node:crypto";
import type { z } from "zod";
import { isBusy } from "@/lib/db/busy";
import { log } from "@/lib/db/log";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { EngineError } from "@/lib/si/errors";

/** What the API says when it does not do what was asked. */
export interface ErrorBody {
  code: string;
  message: string;
  fields?: Record<string, string>;
  current?: unknown;
  changed?: string[];
  detail?: unknown;
}

/** A request refused before its handler: the status and what to say. */
export class RequestError extends Error {
  override readonly name = "RequestError";
  constructor(
    readonly status: number,
    readonly body: ErrorBody,
    readonly headers: Record<string, string> = {},
  ) {
    super(body.message);
  }
}

export function signedOut(): RequestError {
  return new RequestError(401, {
    code: "signed-out",
    message: "You are signed out. Sign in, then try again.",
  });
}

/** 400 with what is wrong per field, the first of it in the sentence. */
export function invalidInput(error: z.ZodError): RequestError {
  const fields: Record<string, string> = {};
  for (const issue of error.issues) fields[issue.path.map(String).join(".")] ??= issue.message;
  const [first] = Object.entries(fields);
  const where = first?.[0] ? `${first[0]}: ` : "";
  return new RequestError(400, {
    code: "invalid",
    message: `Some of this cannot be used. ${where}${first?.[1] ?? "Check what was sent."}`,
    fields,
  });
}

/** Every error as one sentence with a way out. What nobody foresaw is logged under a reference. */
export function errorResponse(error: unknown, request: Request): Response {
  if (error instanceof RequestError) return answer(error.status, error.body, error.headers);
  if (error instanceof NotFoundError) return answer(404, { code: "not-found", message: error.message });
  if (error instanceof ConflictError) {
    const { message, current, changed } = error;
    return answer(409, { code: "conflict", message, current, changed });
  }
  if (error instanceof RefusedError) {
    const { code, message, fields, detail } = error;
    return answer(422, { code, message, fields, detail });
  }
  if (error instanceof EngineError) {
    const { code, message, field } = error;
    return answer(422, { code, message, fields: field ? { [field]: message } : {} });
  }
  if (isBusy(error)) {
    log().warn({ err: error }, "The database stayed locked.");
    const message = "The database is busy with other work. Wait a few seconds, then try again.";
    return answer(503, { code: "busy", message }, { "retry-after": "5" });
  }
  return unforeseen(error, request);
}

function unforeseen(error: unknown, request: Request): Response {
  const reference = randomUUID().slice(0, 8);
  log().error(
    { err: error, reference, method: request.method, path: new URL(request.url).pathname },
    "Unforeseen",
  );
  return answer(500, {
    code: "internal",
    message: `The server failed at this. Try again; if it fails once more, tell whoever runs it: reference ${reference}.`,
    detail: { reference },
  });
}

function answer(status: number, error: ErrorBody, headers: Record<string, string> = {}): Response {
  return Response.json({ error }, { status, headers: { "cache-control": "no-store", ...headers } });
}
