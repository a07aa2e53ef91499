import { cn } from "./class-names";

/** Holds the place of what comes, in its shape. Give it height and width. */
export function Skeleton({ className }: { className?: string }) {
  return <div aria-hidden="true" className={cn("bg-rule-line/60 animate-pulse rounded", className)} />;
}

/** The shape of a table that is on its way. */
export function TableSkeleton({ rows = 8, label = "Loading" }: { rows?: number; label?: string }) {
  return (
    <div role="status" aria-label={label} className="border-rule-line border-t">
      {Array.from({ length: rows }, (_, row) => (
        <div key={row} className="border-rule-line flex h-8 items-center gap-4 border-b px-2">
          <Skeleton className="h-3 w-1/5" />
          <Skeleton className="h-3 w-1/3" />
          <Skeleton className="h-3 w-1/6" />
        </div>
      ))}
    </div>
  );
}
