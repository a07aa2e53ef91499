interface Props {
  /** The number as it is to be read: "50.0", "−12", "1.2e-9". Null shows a dash. */
  text: string | null;
  unit?: string;
  /** Digits after the point that the column reserves, so that its points stand in one line. */
  fraction?: number;
  /** Letters that the column reserves for the unit. */
  unitWidth?: number;
}

/** A number with its unit in soft ink after a thin space, ready to align on the decimal point. */
export function NumberText({ text, unit, fraction = 0, unitWidth }: Props) {
  if (text === null) return <span className="text-ink-soft">–</span>;
  const missing = Math.max(0, fraction - fractionDigits(text));
  const pointMissing = missing > 0 && !text.includes(".");
  return (
    <span className="whitespace-nowrap">
      {text}
      {missing > 0 ? (
        <span aria-hidden="true" className="invisible select-none">
          {pointMissing ? "." : ""}
          {"0".repeat(missing)}
        </span>
      ) : null}
      {unit || unitWidth ? (
        <span
          className="text-ink-soft inline-block text-left"
          style={unitWidth ? { minWidth: `${unitWidth + 0.5}ch` } : undefined}
        >
          {unit ? `\u2009${unit}` : null}
        </span>
      ) : null}
    </span>
  );
}

/** How many digits stand after the point of a written number. */
export function fractionDigits(text: string): number {
  return /\.(\d+)/.exec(text)?.[1]?.length ?? 0;
}
