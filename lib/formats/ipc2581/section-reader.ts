import type { XmlElement } from "./scan-xml";

/** Reads one part of the file, from its element's opening to its closing. */
export interface SectionReader {
  open(element: XmlElement): void;
  close(name: string): void;
}
