import { verdictBar, type VerdictBarOptions, type VerdictCounts } from "@/lib/drawings/verdict-bar.geometry";
import type { ShownVerdict } from "@/lib/drawings/verdict-mark";
import { DrawingSvg } from "./drawing-svg";

type Props = VerdictBarOptions & {
  counts: VerdictCounts;
  onPick?: (verdict: ShownVerdict) => void;
};

/** Counts of fail, near, no data, waived and pass. */
export function VerdictBar({ counts, onPick, ...options }: Props) {
  return (
    <DrawingSvg
      drawing={verdictBar(counts, options)}
      onPick={onPick && ((hit) => onPick(hit as ShownVerdict))}
    />
  );
}
