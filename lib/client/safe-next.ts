/** Where to go after signing in: an address of this site, never one that a link from outside put there. */
export function safeNext(next: string | null | undefined, otherwise: string): string {
  if (!next || !next.startsWith("/") || next.startsWith("//") || next.includes("\\")) return otherwise;
  // A browser drops tabs and line ends before reading an address: "/\t/elsewhere" would leave the site.
  return /[\u0000-\u001f]/.test(next) ? otherwise : next;
}
