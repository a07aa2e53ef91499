import type { ValidationCompared, ValidationGroup } from "../../lib/schemas/validation";

/** One case's numbers, under the group it belongs to. */
export interface CaseValues {
  group: string;
  id: string;
  values: ValidationCompared[];
}

/** Cases gathered by group, in the order in which groups first appear; the worst case of a group first. */
export function grouped(cases: readonly CaseValues[], allowed: number | null): ValidationGroup[] {
  const byGroup = new Map<string, CaseValues[]>();
  for (const entry of cases) {
    if (entry.values.length === 0) continue;
    byGroup.set(entry.group, [...(byGroup.get(entry.group) ?? []), entry]);
  }
  return [...byGroup].map(([title, members]) => {
    const errors = members.flatMap(({ values }) => values.map(({ error }) => error)).sort((a, b) => a - b);
    return {
      title,
      values: errors.length,
      median: errors[Math.floor((errors.length - 1) / 2)] ?? 0,
      worst: errors.at(-1) ?? 0,
      allowed,
      cases: members
        .map(({ id, values }) => ({ id, values: values.length, worst: worstOf(values) }))
        .sort((a, b) => b.worst.error - a.worst.error),
    };
  });
}

function worstOf(values: readonly ValidationCompared[]): ValidationCompared {
  return values.reduce((worst, value) => (value.error > worst.error ? value : worst));
}
