"use client";

import { useTheme } from "next-themes";
import { useSyncExternalStore } from "react";
import { SegmentedControl } from "@/components/ui/segmented-control";

const themes = ["system", "light", "dark"] as const;
type Theme = (typeof themes)[number];
const labels: Record<Theme, string> = { system: "As the system", light: "Light", dark: "Dark" };
const never = (): (() => void) => () => undefined;

/** The theme of this browser. */
export function ThemeChoice() {
  const { theme, setTheme } = useTheme();
  // The server does not know the stored choice, so the first paint in the browser must not show one either.
  const inBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const current = themes.find((candidate) => inBrowser && candidate === theme) ?? "system";
  return <SegmentedControl legend="Theme of this browser" legendHidden value={current} onValueChange={setTheme} options={themes.map((value) => ({ value, label: labels[value] }))} />;
}
