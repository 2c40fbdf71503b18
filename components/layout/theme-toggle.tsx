"use client";

import { Monitor, Moon, Sun, type LucideIcon } from "lucide-react";
import { useTheme } from "next-themes";
import { useSyncExternalStore } from "react";
import { Button } from "@/components/ui/button";
import { DropdownMenu, DropdownMenuContent, DropdownMenuRadioGroup, DropdownMenuRadioItem, DropdownMenuTrigger } from "@/components/ui/dropdown-menu";

const themes = ["system", "light", "dark"] as const;
type Theme = (typeof themes)[number];

const looks: Record<Theme, { label: string; icon: LucideIcon }> = {
  system: { label: "As the system", icon: Monitor },
  light: { label: "Light", icon: Sun },
  dark: { label: "Dark", icon: Moon },
};

const never = (): (() => void) => () => undefined;

/** Light, dark, or whatever the system says. */
export function ThemeToggle() {
  const { theme, setTheme } = useTheme();
  // The server does not know the stored choice, so the first paint in the browser must not show one either.
  const inBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const current = themes.find((candidate) => candidate === theme) ?? "system";
  const Icon = looks[inBrowser ? current : "system"].icon;
  return (
    <DropdownMenu>
      <DropdownMenuTrigger asChild>
        <Button variant="quiet" size="icon" aria-label="Theme">
          <Icon aria-hidden />
        </Button>
      </DropdownMenuTrigger>
      <DropdownMenuContent align="end">
        <DropdownMenuRadioGroup value={current} onValueChange={setTheme}>
          {themes.map((candidate) => (
            <DropdownMenuRadioItem key={candidate} value={candidate}>
              {looks[candidate].label}
            </DropdownMenuRadioItem>
          ))}
        </DropdownMenuRadioGroup>
      </DropdownMenuContent>
    </DropdownMenu>
  );
}
