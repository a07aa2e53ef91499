/** Numbers as causes say them: sensible digits, a true minus sign, a unit always. */

export function number(value: number, digits = 3): string {
  return signed(String(Number(value.toPrecision(digits))));
}

/** A reflection coefficient, with its sign. */
export function reflection(value: number): string {
  const text = value.toFixed(2);
  return text === "-0.00" || text === "0.00" ? "0.00" : value > 0 ? `+${text}` : signed(text);
}

export const ohms = (value: number) => `${number(value, value < 10 ? 2 : 3)} Ω`;
export const volts = (value: number) =>
  Math.abs(value) < 0.0995 ? `${signed((1e3 * value).toFixed(0))} mV` : `${signed(value.toFixed(2))} V`;
export const nanoseconds = (value: number) => `${number(1e9 * value, 2)} ns`;
export const picoseconds = (value: number) =>
  value >= 0.9995e-9 ? nanoseconds(value) : `${signed((1e12 * value).toFixed(0))} ps`;
export const picofarads = (value: number) => `${number(1e12 * value, 2)} pF`;
export const millimetres = (value: number) => `${number(1e3 * value, 3)} mm`;
export const percent = (value: number) => `${number(value, 3)} %`;

/** "a 50 Ω", "an 80 Ω", "an 18 ns", "a 180 Ω": by how the number is spoken. */
export function withArticle(quantity: string): string {
  return `${/^(?:8|1[18](?!\d))/.test(quantity) ? "an" : "a"} ${quantity}`;
}

function signed(text: string): string {
  return Number(text) === 0 ? text.replace("-", "") : text.replace("-", "−");
}
