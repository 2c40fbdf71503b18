"use client";

import { Monitor, Moon, Sun, type LucideIcon } from "lucide-react";
import { useTheme } from "next-themes";
import { lazy, useSyncExternalStore } from "react";
import { Button } from "@/components/ui/button";
import { LazyMenu } from "@/components/ui/lazy-menu";

const themes = ["system", "light", "dark"] as const;
type Theme = (typeof themes)[number];

const looks: Record<Theme, { label: string; icon: LucideIcon }> = {
  system: { label: "As the system", icon: Monitor },
  light: { label: "Light", icon: Sun },
  dark: { label: "Dark", icon: Moon },
};

const ThemeMenuContent = lazy(() => import("./theme-menu-content"));

const choices = themes.map((value) => ({ value, label: looks[value].label }));

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
  const button = (
    <Button variant="quiet" size="icon" aria-label="Theme">
      <Icon aria-hidden />
    </Button>
  );
  return <LazyMenu button={button}>{(trigger) => <ThemeMenuContent trigger={trigger} themes={choices} current={current} setTheme={setTheme} />}</LazyMenu>;
}
