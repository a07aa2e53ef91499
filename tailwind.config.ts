import type { Config } from "tailwindcss";
import plugin from "tailwindcss/plugin";

/** The palette: one name per meaning, with its value on light and on dark paper. */
export const TOKENS = {
  paper: { light: "#FAF8F3", dark: "#14161C" },
  sheet: { light: "#FFFFFF", dark: "#1C1F27" },
  "rule-line": { light: "#DFDACE", dark: "#343946" },
  /** Edge of a field: 3:1 against paper and sheet, which a hairline need not reach. */
  "field-line": { light: "#8C8677", dark: "#767D8E" },
  ink: { light: "#1B1F2A", dark: "#ECE9E1" },
  "ink-soft": { light: "#5B6170", dark: "#A4A9B6" },
  copper: { light: "#A84A15", dark: "#F0935A" },
  violet: { light: "#5A45C6", dark: "#A99BFF" },
  pass: { light: "#1F6F4E", dark: "#63C29A" },
  near: { light: "#8A5A00", dark: "#E0B04A" },
  fail: { light: "#B3261E", dark: "#FF8A80" },
  waived: { light: "#6B6478", dark: "#9A93A8" },
} as const;

type Theme = "light" | "dark";

function variables(theme: Theme): Record<string, string> {
  return {
    "color-scheme": theme,
    ...Object.fromEntries(Object.entries(TOKENS).map(([name, value]) => [`--${name}`, value[theme]])),
  };
}

export default {
  content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}"],
  darkMode: [
    "variant",
    ["@media (prefers-color-scheme: dark) { &:not([data-theme='light'] *) }", "&:is([data-theme='dark'] *)"],
  ],
  theme: {
    colors: {
      transparent: "transparent",
      current: "currentColor",
      ...Object.fromEntries(Object.keys(TOKENS).map((name) => [name, `var(--${name})`])),
    },
    fontFamily: {
      sans: ["Instrument Sans Variable", "system-ui", "sans-serif", "JetBrains Mono Variable"],
      mono: ["JetBrains Mono Variable", "ui-monospace", "monospace"],
    },
    fontSize: {
      xs: ["12px", "16px"],
      sm: ["13px", "20px"],
      base: ["15px", "24px"],
      lg: ["18px", "24px"],
      xl: ["24px", "32px"],
    },
    borderRadius: { none: "0", DEFAULT: "4px", full: "9999px" },
    extend: {
      maxWidth: { prose: "72ch" },
    },
  },
  plugins: [
    plugin((api) => {
      api.addBase({
        ":root": variables("light"),
        "@media (prefers-color-scheme: dark)": { ":root:not([data-theme='light'])": variables("dark") },
        ":root[data-theme='dark']": variables("dark"),
        // On paper there is only the light sheet.
        "@media print": { ":root, :root[data-theme='dark']": variables("light") },
      });
    }),
  ],
} satisfies Config;
