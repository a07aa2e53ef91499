import { apiGet, apiPut } from "./api";
import {
  LENGTH_UNIT_COOKIE,
  type LengthUnit,
  parseLengthUnit,
  parseTheme,
  type Theme,
  THEME_COOKIE,
  writePreference,
} from "./preferences";

interface Preferences {
  lengthUnit: LengthUnit;
  theme: Theme;
}

/**
 * Takes a choice for the screen: on this device at once, and with the account, so that it comes along to others.
 * Whoever is not signed in, or not reached, keeps it on this device.
 */
export async function choosePreference(choice: Partial<Preferences>): Promise<void> {
  const next = { ...onDevice(), ...choice };
  toDevice(next);
  await apiPut("/preferences", next).catch(() => undefined);
}

/** Whoever has just signed in finds the screen as they left it, whatever the one before them chose. */
export async function bringPreferences(): Promise<void> {
  const own = await apiGet<Preferences>("/preferences").catch(() => null);
  if (own) toDevice(own);
}

function toDevice({ lengthUnit, theme }: Preferences): void {
  writePreference(LENGTH_UNIT_COOKIE, lengthUnit);
  writePreference(THEME_COOKIE, theme);
}

function onDevice(): Preferences {
  const jar = new Map(
    document.cookie.split("; ").map((entry) => {
      const [name = "", value = ""] = entry.split("=");
      return [name, value] as const;
    }),
  );
  return {
    lengthUnit: parseLengthUnit(jar.get(LENGTH_UNIT_COOKIE)),
    theme: parseTheme(jar.get(THEME_COOKIE)),
  };
}
