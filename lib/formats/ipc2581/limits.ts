/** What a file may ask of the machine that reads it. */
export interface ReadLimits {
  /** After unpacking [bytes]. */
  expandedBytes: number;
  /** Unpacked to packed; an honest board file stays below a few dozen. Asked once 32 MB are unpacked. */
  expansion: number;
  depth: number;
  /** Lines, pads, holes, corners and the like that are kept. */
  items: number;
}

export const READ_LIMITS: ReadLimits = {
  expandedBytes: 512 * 1024 * 1024,
  expansion: 250,
  depth: 200,
  items: 8_000_000,
};

export const EXPANSION_ASKED_FROM = 32 * 1024 * 1024;
