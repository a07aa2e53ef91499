"use client";

import { UserRound } from "lucide-react";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Menu, MenuChoice, MenuItem, MenuSeparator } from "@/components/ui/menu";
import { forgetDraftTexts } from "@/components/ui/use-draft-text";
import { choosePreference } from "@/lib/client/own-preferences";
import { parseTheme, type Theme } from "@/lib/client/preferences";
import type { ShellUser } from "./types";

const THEME_OPTIONS = [
  { value: "system", label: "As this device" },
  { value: "light", label: "Light" },
  { value: "dark", label: "Dark" },
] as const;

/** Who is signed in, how the screen looks for them, and the way out. */
export function AccountMenu({ user, role }: { user: ShellUser; role: string | null }) {
  const router = useRouter();
  const [theme, setTheme] = useState<Theme | null>(null);

  function choose(value: string) {
    const next = parseTheme(value);
    void choosePreference({ theme: next });
    setTheme(next);
    if (next === "system") delete document.documentElement.dataset.theme;
    else document.documentElement.dataset.theme = next;
  }

  async function signOut() {
    // Loaded when it is needed: few leave on the page that they opened.
    const { authClient } = await import("@/lib/client/auth");
    await authClient.signOut();
    forgetDraftTexts();
    router.push("/");
    router.refresh();
  }

  return (
    <Menu
      align="end"
      trigger={
        <Button
          variant="quiet"
          aria-label={`Account of ${user.name}`}
          onPointerDown={() => setTheme(currentTheme())}
          onFocus={() => setTheme(currentTheme())}
        >
          <UserRound size={16} aria-hidden="true" />
          <span className="max-w-40 truncate max-md:hidden">{user.name}</span>
        </Button>
      }
    >
      <div className="px-2 py-1 text-sm">
        <p className="font-medium">{user.name}</p>
        <p className="text-ink-soft text-xs break-all">
          {user.email}
          {role ? ` · ${role}` : null}
        </p>
      </div>
      <MenuSeparator />
      <MenuChoice label="Theme" value={theme ?? "system"} onValueChange={choose} options={THEME_OPTIONS} />
      <MenuSeparator />
      <MenuItem onSelect={() => void signOut()}>Sign out</MenuItem>
    </Menu>
  );
}

/** The theme that the server drew, which the page itself carries. */
function currentTheme(): Theme {
  return parseTheme(document.documentElement.dataset.theme);
}
