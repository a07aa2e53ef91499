/** The name, or where it is taken, the name with the first free number after it. */
export function freeName(name: string, taken: readonly string[]): string {
  const used = new Set(taken.map((entry) => entry.toLowerCase()));
  if (!used.has(name.toLowerCase())) return name;
  let number = 2;
  while (used.has(`${name} ${number}`.toLowerCase())) number++;
  return `${name} ${number}`;
}
