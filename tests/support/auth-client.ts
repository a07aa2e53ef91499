import { getAuth } from "@/lib/auth/auth";
import { TEST_URL } from "./signed-in";

export interface Answer {
  status: number;
  /** Where a redirect leads. */
  location: string | null;
  body: unknown;
}

/** A browser with cookies of its own, speaking to the handler that the server mounts. */
export class AuthClient {
  readonly cookies = new Map<string, string>();

  get headers(): Headers {
    const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join("; ");
    return new Headers(cookie ? { cookie, origin: TEST_URL } : { origin: TEST_URL });
  }

  post(path: string, body: unknown, headers: Record<string, string> = {}): Promise<Answer> {
    return this.send("POST", `${TEST_URL}/api/auth${path}`, body, headers);
  }

  get(path: string): Promise<Answer> {
    return this.send("GET", `${TEST_URL}/api/auth${path}`);
  }

  /** Opens a link from a message. */
  open(link: URL): Promise<Answer> {
    return this.send("GET", link.href);
  }

  private async send(
    method: string,
    url: string,
    body?: unknown,
    extra: Record<string, string> = {},
  ): Promise<Answer> {
    const headers = this.headers;
    if (body !== undefined) headers.set("content-type", "application/json");
    for (const [name, value] of Object.entries(extra)) headers.set(name, value);
    const auth = await getAuth();
    const response = await auth.handler(
      new Request(url, { method, headers, body: body === undefined ? undefined : JSON.stringify(body) }),
    );
    for (const line of response.headers.getSetCookie()) {
      const [pair = "", ...attributes] = line.split("; ");
      const [name = "", value = ""] = pair.split(/=(.*)/s);
      if (attributes.some((attribute) => /^max-age=0$/i.test(attribute))) this.cookies.delete(name);
      else this.cookies.set(name, value);
    }
    const text = await response.text();
    return {
      status: response.status,
      location: response.headers.get("location"),
      body:
        text.startsWith("{") || text.startsWith("[") || text === "null"
          ? (JSON.parse(text) as unknown)
          : text,
    };
  }
}
