/** The circuit of the landing page's drawing: a stiff driver, one line, an open end. */
export interface SketchCircuit {
  /** Driver resistance [Ω]. */
  source: number;
  /** Impedance of the line [Ω]. */
  line: number;
  /** How many crossings of the line are drawn. */
  crossings: number;
}

export interface SketchRay {
  /** Place at the start and the end of the crossing, in line lengths. */
  from: 0 | 1;
  to: 0 | 1;
  /** When it starts, in line delays; it takes one. */
  start: number;
  /** Its size, in parts of the swing. */
  amplitude: number;
}

export interface SketchStep {
  /** When the far end takes this voltage, in line delays. */
  at: number;
  /** In parts of the swing. */
  voltage: number;
}

/** The crossings of a step sent into an open line, and the voltage at its far end after each arrival. */
export function bounceSketch({ source, line, crossings }: SketchCircuit): {
  rays: SketchRay[];
  farEnd: SketchStep[];
} {
  const atDriver = (source - line) / (source + line);
  const atOpenEnd = 1;
  const rays: SketchRay[] = [];
  const farEnd: SketchStep[] = [{ at: 0, voltage: 0 }];
  let amplitude = line / (source + line);
  let voltage = 0;
  for (let crossing = 0; crossing < crossings; crossing++) {
    const outward = crossing % 2 === 0;
    rays.push({ from: outward ? 0 : 1, to: outward ? 1 : 0, start: crossing, amplitude });
    if (outward) {
      voltage += amplitude * (1 + atOpenEnd);
      farEnd.push({ at: crossing + 1, voltage });
    }
    amplitude *= outward ? atOpenEnd : atDriver;
  }
  return { rays, farEnd };
}
