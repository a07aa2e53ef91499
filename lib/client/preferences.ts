/**
 * What a person chose for the screen. Kept in cookies, so that the server draws the first page in the chosen
 * theme and unit and nothing flashes or jumps.
 */
export const THEMES = ["system", "light", "dark"] as const;
export const LENGTH_UNITS = ["mm", "mil"] as const;

export type Theme = (typeof THEMES)[number];
export type LengthUnit = (typeof LENGTH_UNITS)[number];

export const THEME_COOKIE = "theme";
export const LENGTH_UNIT_COOKIE = "length-unit";

export function parseTheme(value: string | undefined): Theme {
  return THEMES.find((theme) => theme === value) ?? "system";
}

export function parseLengthUnit(value: string | undefined): LengthUnit {
  return LENGTH_UNITS.find((unit) => unit === value) ?? "mm";
}

const ONE_YEAR_S = 365 * 24 * 3600;

/** Writes a preference in the browser for a year. */
export function writePreference(name: typeof THEME_COOKIE | typeof LENGTH_UNIT_COOKIE, value: string): void {
  document.cookie = `${name}=${value}; path=/; max-age=${ONE_YEAR_S}; samesite=lax`;
}
