import type { Route } from "next";
import Link from "next/link";

const PLACES = [
  { id: "nets", label: "Nets", path: "nets" },
  { id: "parts", label: "Parts", path: "nets/parts" },
] as const;

interface Props {
  projectId: string;
  current: (typeof PLACES)[number]["id"];
  /** "?rev=A" or nothing. */
  search: string;
}

/** The two tables that a layout's lists fill. */
export function NetPlaces({ projectId, current, search }: Props) {
  return (
    <nav aria-label="Lists of the layout" className="border-rule-line flex gap-1 border-b print:hidden">
      {PLACES.map(({ id, label, path }) => (
        <Link
          key={id}
          href={`/projects/${projectId}/${path}${search}` as Route}
          aria-current={id === current ? "page" : undefined}
          className="text-ink-soft hover:text-ink aria-[current=page]:border-copper aria-[current=page]:text-ink -mb-px flex h-8 items-center border-b-2 border-transparent px-3 text-sm -outline-offset-2 aria-[current=page]:font-medium"
        >
          {label}
        </Link>
      ))}
    </nav>
  );
}
