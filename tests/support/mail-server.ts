import type { AddressInfo } from "node:net";
import { simpleParser, type ParsedMail } from "mailparser";
import { SMTPServer } from "smtp-server";

export interface MailServer {
  url: string;
  /** The next message to this address; waits until it arrives. */
  next(to: string): Promise<ParsedMail>;
  /** Messages that came and nobody asked for. */
  waiting(to: string): number;
  close(): Promise<void>;
}

/** A mail server on a free port of this computer that keeps what it is given. */
export async function startMailServer(): Promise<MailServer> {
  const kept = new Map<string, ParsedMail[]>();
  const asked = new Map<string, ((mail: ParsedMail) => void)[]>();

  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS", "AUTH"],
    logger: false,
    onData(stream, { envelope }, done) {
      simpleParser(stream).then(
        (mail) => {
          for (const { address } of envelope.rcptTo) {
            const taker = asked.get(address)?.shift();
            if (taker) taker(mail);
            else kept.set(address, [...(kept.get(address) ?? []), mail]);
          }
          done();
        },
        (error: Error) => done(error),
      );
    },
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const { port } = server.server.address() as AddressInfo;

  return {
    url: `smtp://127.0.0.1:${port}`,
    next: (to) => {
      const mail = kept.get(to)?.shift();
      if (mail) return Promise.resolve(mail);
      return new Promise((resolve) => asked.set(to, [...(asked.get(to) ?? []), resolve]));
    },
    waiting: (to) => kept.get(to)?.length ?? 0,
    close: () => new Promise((resolve) => server.close(resolve)),
  };
}

/** The first web address in a message's text. */
export function linkIn(mail: ParsedMail): URL {
  const found = /https?:\/\/\S+/.exec(mail.text ?? "");
  if (!found) throw new Error(`No link in: ${mail.text ?? ""}`);
  return new URL(found[0]);
}
