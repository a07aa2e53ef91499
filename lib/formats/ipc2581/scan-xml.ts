import sax from "sax";
import { BoardFileError } from "./errors";
import type { ReadLimits } from "./limits";

export interface XmlElement {
  /** Without a namespace's prefix. */
  name: string;
  attributes: Readonly<Record<string, string>>;
  /** Counted from 1. */
  line: number;
}

export interface XmlHandler {
  open(element: XmlElement): void;
  close(name: string): void;
}

/** What the package has beside its published types. */
type Parser = sax.SAXParser & { doctype?: string | boolean };
const OPTIONS: sax.SAXOptions & { strictEntities: boolean } = { position: true, strictEntities: true };

const EXPECTED = "An IPC-2581 file (XML, or XML packed with gzip) is expected.";

/** Reads XML as it streams in. No document type, no entities but the five of XML itself, no depth beyond the limit. */
export class XmlScanner {
  private readonly parser: Parser;
  private depth = 0;

  constructor(
    private readonly handler: XmlHandler,
    private readonly limits: Pick<ReadLimits, "depth">,
  ) {
    const parser: Parser = sax.parser(true, OPTIONS);
    parser.onerror = (error) => {
      throw this.refusal(error);
    };
    parser.ondoctype = () => {
      throw this.doctype();
    };
    parser.onopentag = (tag) => {
      if (++this.depth > this.limits.depth)
        throw new BoardFileError(
          "too deep",
          `Line ${this.line()}: elements stand more than ${this.limits.depth} deep, which no board file needs. Export it again.`,
          this.line(),
        );
      this.handler.open({
        name: localName(tag.name),
        attributes: tag.attributes as Record<string, string>,
        line: this.line(),
      });
    };
    parser.onclosetag = (name) => {
      this.depth--;
      this.handler.close(localName(name));
    };
    this.parser = parser;
  }

  write(text: string): void {
    this.parser.write(text);
    // A document type of any length is refused as soon as it begins.
    if (this.parser.doctype) throw this.doctype();
  }

  end(): void {
    this.parser.close();
  }

  private line(): number {
    return this.parser.line + 1;
  }

  private doctype(): BoardFileError {
    return new BoardFileError(
      "doctype",
      `Line ${this.line()}: a document type (DOCTYPE) is not read, since it can make a small file huge. Remove it; IPC-2581 needs none.`,
      this.line(),
    );
  }

  private refusal(cause: Error): BoardFileError {
    const line = this.line();
    const said = cause.message.split("\n")[0] ?? "";
    if (this.parser.doctype || /doctype/i.test(said)) return this.doctype();
    if (/entity/i.test(said))
      return new BoardFileError(
        "entity",
        `Line ${line}: an entity other than &lt; &gt; &amp; &quot; &apos; is not read. Write the character itself.`,
        line,
        { cause },
      );
    if (/unclosed root|unexpected end/i.test(said))
      return new BoardFileError(
        "cut off",
        `The file ends in line ${line} before its elements are closed: it is cut off. Export or send it again.`,
        line,
        { cause },
      );
    if (/non-whitespace before first tag/i.test(said))
      return new BoardFileError("not xml", `This file is no XML. ${EXPECTED}`, line, { cause });
    return new BoardFileError(
      "not xml",
      `Line ${line} is not well-formed XML (${said.replace(/\.$/, "").toLowerCase()}). ${EXPECTED}`,
      line,
      { cause },
    );
  }
}

function localName(name: string): string {
  const colon = name.indexOf(":");
  return colon < 0 ? name : name.slice(colon + 1);
}
