"use client";

import { useMemo } from "react";
import { TraceSection } from "@/components/charts/trace-section";
import { Skeleton } from "@/components/ui/skeleton";
import type { Trial } from "@/lib/client/engine-impedance";
import type { FieldLines } from "@/lib/client/engine-field";
import type { LengthUnit } from "@/lib/client/preferences";
import { traceSection } from "@/lib/drawings/trace-section.geometry";
import { sectionRows } from "@/lib/drawings/trace-words";
import { Saved } from "./saved";

interface Props {
  trial: Trial | null;
  field: FieldLines | null;
  unit: LengthUnit;
  title: string;
  fileName: string;
}

const HEIGHT = 270;
const SAVED = { width: 720, height: 420 };
/** In which the section is drawn: beside the table, on a phone, in a file. */
export const SECTION_SIZES = [{ width: 494, height: HEIGHT }, { width: 320, height: HEIGHT }, SAVED] as const;

/** The section that was solved, to scale, with its lines of equal potential. */
export function SectionDrawing({ trial, field, unit, title, fileName }: Props) {
  const section = trial?.section;
  // Lines of another section than the one drawn would lie.
  const equipotentials = useMemo(
    () => (section && field && isSame(section, field.section) ? field.lines : undefined),
    [section, field],
  );
  if (!section)
    return trial ? null : (
      <div className="mt-3" style={{ height: HEIGHT }}>
        <Skeleton className="h-full w-full" />
      </div>
    );
  return (
    <div className="mt-3">
      <TraceSection
        shape={section}
        unit={unit}
        height={HEIGHT}
        title={title}
        equipotentials={equipotentials}
      />
      <Saved
        words="Lines of equal potential at every tenth of the voltage."
        fileName={fileName}
        drawing={() => traceSection(section, { ...SAVED, unit, title, equipotentials })}
        rows={() => sectionRows(section, unit)}
      />
    </div>
  );
}

const isSame = (a: object, b: object): boolean => JSON.stringify(a) === JSON.stringify(b);
