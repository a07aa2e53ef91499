import "@fontsource-variable/instrument-sans/index.css";
import "@fontsource-variable/jetbrains-mono/index.css";
import "./globals.css";
import type { Metadata, Viewport } from "next";
import { cookies, headers } from "next/headers";
import type { ReactNode } from "react";
import { LengthUnitProvider } from "@/components/shell/length-unit";
import { Providers } from "@/components/shell/providers";
import { LENGTH_UNIT_COOKIE, parseLengthUnit, parseTheme, THEME_COOKIE } from "@/lib/client/preferences";
import { TOKENS } from "@/tailwind.config";

export const metadata: Metadata = {
  title: { default: "Ringfence", template: "%s · Ringfence" },
  description: "Keeps every net of a board inside its signal-integrity rules.",
};

export const viewport: Viewport = {
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: TOKENS.paper.light },
    { media: "(prefers-color-scheme: dark)", color: TOKENS.paper.dark },
  ],
};

export default async function RootLayout({ children }: { children: ReactNode }) {
  // Reading the request's headers also makes every page dynamic, which a nonce per answer requires.
  const nonce = (await headers()).get("x-nonce") ?? "";
  const jar = await cookies();
  const theme = parseTheme(jar.get(THEME_COOKIE)?.value);
  return (
    <html lang="en" data-theme={theme === "system" ? undefined : theme} suppressHydrationWarning>
      <body>
        <Providers nonce={nonce}>
          <LengthUnitProvider initial={parseLengthUnit(jar.get(LENGTH_UNIT_COOKIE)?.value)}>
            {children}
          </LengthUnitProvider>
        </Providers>
      </body>
    </html>
  );
}
