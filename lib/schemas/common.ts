import { z } from "zod";

/** UUIDv7 text; ids are made by the server. */
export const id = z.uuid();

/** What a result is about: a signal path's lineage id, or "line", a class's and a layer's. */
export const resultKey = z.union([
  id,
  z.string().regex(/^line [0-9a-f-]{36} [0-9a-f-]{36}$/, "That names neither a path nor a line."),
]);

/** Where an input came from; findings that rest on an assumed one are counted apart. */
export const origins = ["measured", "model", "data sheet", "fabricator", "assumed"] as const;
export const origin = z.enum(origins);
export type Origin = z.infer<typeof origin>;

/** A name as shown and compared: trimmed, inner white space single, no control characters. */
export const nameText = (max: number) =>
  z
    .string()
    .transform((s) => s.normalize("NFC").replace(/\s+/gu, " ").trim())
    .pipe(
      z
        .string()
        .min(1, "Give it a name.")
        .max(max, `At most ${max} characters.`)
        .regex(/^[^\p{Cc}]*$/u, "Control characters are not allowed."),
    );

/** Free text of a person: reasons, comments. */
export const proseText = (max: number) => z.string().trim().min(1, "Write something here.").max(max);

/** Every editable thing carries the version it was read at; a stale one is refused with 409. */
export const version = z.number().int().min(0);
