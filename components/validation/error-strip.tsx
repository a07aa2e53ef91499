import type { ValidationGroup } from "@/lib/schemas/validation";
import { errorText, placeOf } from "./error-strip.geometry";

const WIDTH = 200;
const HEIGHT = 20;
const at = (error: number) => 6 + placeOf(error) * (WIDTH - 12);

/** Each case's largest error as a tick on a logarithmic axis, 10⁻¹⁰ to 1, and what is allowed as a bar. */
export function ErrorStrip({ group }: { group: ValidationGroup }) {
  const { allowed } = group;
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      width={WIDTH}
      height={HEIGHT}
      role="img"
      aria-label={`${group.cases.length} cases, the largest error ${errorText(group.worst)}${allowed === null ? "" : `, allowed ${errorText(allowed)}`}`}
    >
      <line x1={6} x2={WIDTH - 6} y1={HEIGHT / 2} y2={HEIGHT / 2} className="stroke-rule-line" />
      {[1e-8, 1e-6, 1e-4, 1e-2].map((decade) => (
        <line
          key={decade}
          x1={at(decade)}
          x2={at(decade)}
          y1={HEIGHT / 2 - 2}
          y2={HEIGHT / 2 + 2}
          className="stroke-field-line"
        />
      ))}
      {group.cases.map(({ id, worst }) => (
        <line
          key={id}
          x1={at(worst.error)}
          x2={at(worst.error)}
          y1={5}
          y2={HEIGHT - 5}
          strokeWidth={1.5}
          strokeOpacity={0.65}
          className={allowed !== null && worst.error > allowed ? "stroke-fail" : "stroke-copper"}
        />
      ))}
      {allowed === null ? null : (
        <line
          x1={at(allowed)}
          x2={at(allowed)}
          y1={1}
          y2={HEIGHT - 1}
          strokeWidth={2}
          className="stroke-ink"
        />
      )}
    </svg>
  );
}
