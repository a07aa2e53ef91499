/** Resistors to a rail of more than this many line impedances end no line: they are pulls (common practice, no source). */
export const PULL = 5;
