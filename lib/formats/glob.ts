/**
 * A pattern of names: `*` any run of characters, `?` one, case does not count; all else stands for itself.
 * Time is at most pattern × text, whatever a person writes (a regular expression could take for ever).
 */
export function globMatcher(pattern: string): (text: string) => boolean {
  if (/^\*+$/.test(pattern)) return () => true;
  const wanted = [...pattern.toLowerCase()];
  return (text) => matches(wanted, [...text.toLowerCase()]);
}

function matches(pattern: readonly string[], text: readonly string[]): boolean {
  let p = 0;
  let t = 0;
  let star = -1;
  let resume = 0;
  while (t < text.length) {
    const wanted = pattern[p];
    if (wanted === "*") {
      star = p++;
      resume = t;
    } else if (p < pattern.length && (wanted === "?" || wanted === text[t])) {
      p++;
      t++;
    } else if (star >= 0) {
      p = star + 1;
      t = ++resume;
    } else return false;
  }
  while (pattern[p] === "*") p++;
  return p === pattern.length;
}
