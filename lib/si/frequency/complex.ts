/** A complex number of a phasor e^{jωt}. */
export interface Complex {
  re: number;
  im: number;
}
