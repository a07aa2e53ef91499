import "server-only";
import type { z } from "zod";
import type { UserActor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import { roleMay, type Permission } from "@/lib/schemas/role";
import { errorResponse, signedOut } from "./route-errors";
import { isWrite, readBytes, readJson, readParams, readQuery, requireSameOrigin } from "./route-input";
import { readSigned, type Person } from "./session";

const MAX_BODY_BYTES = 1_048_576;

/** Anybody; anybody signed in, with or without a team; or roles that hold the permission (any one of a list). */
export type Access = "public" | "session" | Permission | readonly Permission[];

type ActorOf<A extends Access> = A extends "public"
  ? null
  : A extends "session"
    ? UserActor | null
    : UserActor;
type PersonOf<A extends Access> = A extends "public" ? null : Person;
type Parsed<S> = S extends z.ZodType ? z.output<S> : S extends "bytes" ? Uint8Array<ArrayBuffer> : undefined;

export interface RouteInput<A extends Access, P, Q, B> {
  actor: ActorOf<A>;
  person: PersonOf<A>;
  params: Parsed<P>;
  query: Parsed<Q>;
  body: Parsed<B>;
  request: Request;
}

interface RouteOptions<A extends Access, P, Q, B> {
  access: A;
  /** What does not fit is answered 404. */
  params?: P;
  query?: Q;
  /** JSON that fits the schema, or "bytes" for a file as it is. */
  body?: B;
  maxBodyBytes?: number;
  /** A Response goes out as it is, undefined as 204, anything else as JSON. */
  handler: (input: RouteInput<A, P, Q, B>) => unknown;
}

export interface RouteHandler {
  (
    request: Request,
    context: { params: Promise<Record<string, string | string[] | undefined>> },
  ): Promise<Response>;
  /** Read by the test that walks every route. */
  access: Access;
}

/**
 * A handler of app/api/v1 with declared access. It lets in whom `access` names (401 signed out; 404 for a role
 * without the right, as if there were nothing), takes writes from our own pages only, parses what comes in, and
 * words every error. Which rows somebody may touch is decided in lib/db, which the handler gives the actor to.
 */
export function route<
  const A extends Access,
  P extends z.ZodType | undefined = undefined,
  Q extends z.ZodType | undefined = undefined,
  B extends z.ZodType | "bytes" | undefined = undefined,
>(options: RouteOptions<A, P, Q, B>): RouteHandler {
  const { access, params, query, body, maxBodyBytes = MAX_BODY_BYTES, handler } = options;

  const handle = async (request: Request, context: { params: Promise<unknown> }): Promise<Response> => {
    try {
      if (isWrite(request)) requireSameOrigin(request);
      const { actor, person } = await admit(access, request);
      const input = {
        actor,
        person,
        params: params ? readParams(params, await context.params) : undefined,
        query: query ? readQuery(query, request) : undefined,
        body: body
          ? body === "bytes"
            ? await readBytes(request, maxBodyBytes)
            : await readJson(body, request, maxBodyBytes)
          : undefined,
        request,
      };
      return respond(await handler(input as RouteInput<A, P, Q, B>));
    } catch (error) {
      // Next's own signals, such as notFound(), are thrown past us.
      if (error instanceof Error && "digest" in error && String(error.digest).startsWith("NEXT_"))
        throw error;
      return errorResponse(error, request);
    }
  };
  return Object.assign(handle, { access });
}

async function admit(
  access: Access,
  request: Request,
): Promise<{ actor: UserActor | null; person: Person | null }> {
  if (access === "public") return { actor: null, person: null };
  const signed = await readSigned(request.headers);
  if (!signed) throw signedOut();
  const { actor, person } = signed;
  if (access !== "session" && !(actor && permissionsOf(access).some((one) => roleMay(actor.role, one))))
    throw new NotFoundError();
  return { actor, person };
}

/** The permissions of which one is enough. */
export function permissionsOf(access: Access): readonly Permission[] {
  if (access === "public" || access === "session") return [];
  return typeof access === "string" ? [access] : access;
}

function respond(result: unknown): Response {
  if (result instanceof Response) return result;
  const headers = { "cache-control": "private, no-store" };
  if (result === undefined) return new Response(null, { status: 204, headers });
  return Response.json(result, { headers });
}
