"use client";

import { ExportMenu } from "@/components/charts/export-menu";
import { TraceSection } from "@/components/charts/trace-section";
import { Skeleton } from "@/components/ui/skeleton";
import type { Trial } from "@/lib/client/engine-impedance";
import type { LengthUnit } from "@/lib/client/preferences";
import { traceSection } from "@/lib/drawings/trace-section.geometry";
import { sectionRows } from "@/lib/drawings/trace-words";

interface Props {
  trial: Trial | null;
  unit: LengthUnit;
  title: string;
  fileName: string;
}

const HEIGHT = 280;

/** The section that was solved, to scale, with its lines of equal potential. */
export function SectionDrawing({ trial, unit, title, fileName }: Props) {
  const section = trial?.section;
  if (!section)
    return trial ? null : (
      <div className="mt-3" style={{ height: HEIGHT }}>
        <Skeleton className="h-full w-full" />
      </div>
    );
  return (
    <div className="mt-3">
      <TraceSection shape={section} unit={unit} height={HEIGHT} title={title} />
      <div className="flex justify-end">
        <ExportMenu
          fileName={fileName}
          drawing={() => traceSection(section, { width: 720, height: 420, unit, title })}
          rows={() => sectionRows(section, unit)}
        />
      </div>
    </div>
  );
}
