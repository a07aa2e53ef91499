const STEPS = [
  { id: "list", label: "List" },
  { id: "columns", label: "Columns and rows" },
  { id: "import", label: "Import" },
  { id: "roles", label: "Roles and names" },
] as const;

/** Where one is on the way from a file to nets that can be checked. */
export function ImportSteps({ current }: { current: (typeof STEPS)[number]["id"] }) {
  const at = STEPS.findIndex(({ id }) => id === current);
  return (
    <ol aria-label="Steps" className="flex flex-wrap gap-x-6 gap-y-1 text-sm">
      {STEPS.map(({ id, label }, index) => (
        <li
          key={id}
          aria-current={id === current ? "step" : undefined}
          className={index === at ? "border-copper border-b-2 font-medium" : "text-ink-soft"}
        >
          {index + 1}. {label}
          {index < at ? <span className="sr-only"> (done)</span> : null}
        </li>
      ))}
    </ol>
  );
}
