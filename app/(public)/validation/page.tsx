import type { Metadata } from "next";
import Link from "next/link";
import { Mark } from "@/components/shell/mark";
import { Sheet } from "@/components/shell/sheet";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { Chapter } from "@/components/validation/chapter";
import { readValidation } from "@/lib/reports/validation";

export const metadata: Metadata = { title: "Validation" };

/** How far the engine is from values computed elsewhere. */
export default async function ValidationPage() {
  const report = await readValidation();
  return (
    <div className="mx-auto flex min-h-dvh max-w-6xl flex-col">
      <header className="flex items-center px-4 pt-6 lg:px-6">
        <Link href="/" className="flex items-center gap-2 font-semibold">
          <Mark size={28} />
          Ringfence
        </Link>
      </header>
      <Sheet>
        <PageHeader
          title="Validation"
          description={
            report
              ? `Engine ${report.engine} against published and independently computed values, measured when this installation was built.`
              : "The engine against published and independently computed values."
          }
        />
        {report ? (
          <div className="flex flex-col gap-12">
            {report.chapters.map((chapter) => (
              <Chapter key={chapter.id} chapter={chapter} />
            ))}
            <p className="text-ink-soft max-w-prose text-sm">
              Agreement with other computations says that the equations are solved well, not that a board is
              built as drawn. The fabricator’s process, the laminate’s data sheet and measurement on coupons
              decide, and no number here replaces the review of a qualified engineer.
            </p>
          </div>
        ) : (
          <EmptyState title="Not measured yet">
            The figures are made when the app is built. Stop it, run npm start, and open this page again.
          </EmptyState>
        )}
      </Sheet>
    </div>
  );
}
