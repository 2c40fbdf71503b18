"use client";

import { Search } from "lucide-react";
import { useEffect } from "react";
import { Button } from "@/components/ui/button";

/** The band's find button; it also answers Ctrl-K and Cmd-K from anywhere on the page. */
export function FindButton({ onFind }: { onFind: () => void }) {
  useEffect(() => {
    function onKeyDown(event: globalThis.KeyboardEvent): void {
      if (event.key.toLowerCase() !== "k" || !(event.ctrlKey || event.metaKey) || event.altKey) return;
      event.preventDefault();
      onFind();
    }
    window.addEventListener("keydown", onKeyDown);
    return () => window.removeEventListener("keydown", onKeyDown);
  }, [onFind]);
  return (
    <Button variant="plain" size="small" onClick={onFind} aria-keyshortcuts="Control+K Meta+K" className="min-h-9">
      <Search aria-hidden />
      <span className="sr-only sm:not-sr-only">Find</span>
      <kbd aria-hidden className="hidden text-xs font-normal text-faint xl:inline">
        Ctrl K
      </kbd>
    </Button>
  );
}
