/** An answer that is not a success, as the API words it. */
interface ErrorBody {
  error?: {
    code?: string;
    message?: string;
    fields?: Record<string, string>;
    current?: unknown;
    changed?: string[];
    detail?: unknown;
  };
}

/** The API refused, or could not be reached; `message` is one sentence fit for the screen. */
export class ApiError extends Error {
  override readonly name = "ApiError";
  constructor(
    message: string,
    /** HTTP status; 0 when the server could not be reached. */
    readonly status: number,
    readonly code: string,
    /** Per field of the form, what is wrong with it. */
    readonly fields: Record<string, string> = {},
    /** 409: the thing as it is now. */
    readonly current: unknown = null,
    /** 409: names of what differs from what was read. */
    readonly changed: string[] = [],
    readonly detail: unknown = null,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }

  /** Somebody else changed it since it was read. */
  get isConflict(): boolean {
    return this.status === 409 && this.code === "conflict";
  }
}

type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

interface RequestOptions {
  body?: unknown;
  signal?: AbortSignal;
  /** Left out where the value is null, undefined or empty. */
  query?: Record<string, string | number | boolean | null | undefined>;
}

/**
 * Calls `/api/v1${path}` and returns its JSON. The server checks what it sends; the type is the caller's to name.
 * @throws ApiError
 */
export async function api<T>(method: Method, path: string, options: RequestOptions = {}): Promise<T> {
  let response: Response;
  try {
    response = await fetch(`/api/v1${path}${queryText(options.query)}`, {
      method,
      headers: options.body === undefined ? undefined : { "content-type": "application/json" },
      body: options.body === undefined ? undefined : JSON.stringify(options.body),
      signal: options.signal,
      credentials: "same-origin",
    });
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === "AbortError") throw cause;
    throw new ApiError(
      "The server could not be reached. Check the connection, then try again.",
      0,
      "offline",
      {},
      null,
      [],
      null,
      {
        cause,
      },
    );
  }
  if (!response.ok) throw await readError(response);
  return (response.status === 204 ? undefined : await response.json()) as T;
}

export const apiGet = <T>(path: string, query?: RequestOptions["query"], signal?: AbortSignal) =>
  api<T>("GET", path, { query, signal });
export const apiPost = <T>(path: string, body: unknown = {}) => api<T>("POST", path, { body });
export const apiPut = <T>(path: string, body: unknown) => api<T>("PUT", path, { body });
export const apiPatch = <T>(path: string, body: unknown) => api<T>("PATCH", path, { body });
export const apiDelete = <T>(path: string, body?: unknown) => api<T>("DELETE", path, { body });

/** What to show for anything that was thrown while talking to the API. */
export function errorMessage(error: unknown): string {
  return error instanceof Error ? error.message : "Something failed that gave no reason. Try again.";
}

async function readError(response: Response): Promise<ApiError> {
  const body = (await response.json().catch(() => ({}))) as ErrorBody;
  const error = body.error ?? {};
  return new ApiError(
    error.message ?? fallback(response.status),
    response.status,
    error.code ?? String(response.status),
    error.fields ?? {},
    error.current ?? null,
    error.changed ?? [],
    error.detail ?? null,
  );
}

function fallback(status: number): string {
  if (status === 401) return "You are signed out. Sign in, then try again.";
  if (status === 404) return "It does not exist, or is not yours to see.";
  if (status === 413) return "This is more than the server takes at once. Send it in parts.";
  if (status === 429) return "Too many requests in a short time. Wait a minute, then try again.";
  return "The server could not do this now. Try again; if it happens once more, tell whoever runs it.";
}

function queryText(query: RequestOptions["query"]): string {
  const params = new URLSearchParams();
  for (const [key, value] of Object.entries(query ?? {}))
    if (value !== null && value !== undefined && value !== "") params.set(key, String(value));
  return params.size > 0 ? `?${params.toString()}` : "";
}
