import { usualProcess, type ProcessDoc } from "@/lib/schemas/process";
import type { Process } from "@/lib/si/stackup";
import { toSi } from "@/lib/si/units";

/** The fabricator's process in SI; as usual where none was entered. */
export function processToSi(doc: ProcessDoc = usualProcess): Process {
  const share = (percent: string) => Number(percent) / 100;
  return {
    width: share(doc.widthPercent),
    copper: share(doc.copperPercent),
    dielectric: share(doc.dielectricPercent),
    dk: share(doc.dkPercent),
    mask: share(doc.maskPercent),
    distribution: doc.distribution,
    minWidth: doc.minWidth ? toSi(doc.minWidth, "length") : null,
    minGap: doc.minGap ? toSi(doc.minGap, "length") : null,
  };
}
