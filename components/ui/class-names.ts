/** Joins class names, leaving out what is absent. Later classes do not override earlier ones of their kind. */
export function cn(...parts: (string | false | null | undefined)[]): string {
  return parts.filter(Boolean).join(" ");
}
