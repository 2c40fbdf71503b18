"use client";

import { Menu, X } from "lucide-react";
import { usePathname } from "next/navigation";
import { useId, useState, type ReactNode } from "react";
import { Button } from "@/components/ui/button";

/** The narrow page's disclosure. It closes when the page changes and on Escape. */
export function BandMenu({ children }: { children: ReactNode }) {
  const path = usePathname();
  const [openOn, setOpenOn] = useState<string | null>(null);
  const panelId = useId();
  const open = openOn !== null && openOn === path;
  return (
    <div className="contents lg:hidden" onKeyDown={(event) => event.key === "Escape" && setOpenOn(null)}>
      <Button variant="quiet" size="icon" className="lg:hidden" aria-expanded={open} aria-controls={panelId} aria-label="Menu" onClick={() => setOpenOn(open ? null : path)}>
        {open ? <X aria-hidden /> : <Menu aria-hidden />}
      </Button>
      <div id={panelId} hidden={!open} className="w-full border-t border-hairline py-3 lg:hidden">
        {children}
      </div>
    </div>
  );
}
