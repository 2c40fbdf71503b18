"use client";

import { cloneElement, Suspense, useState, type ComponentProps, type ReactElement, type ReactNode } from "react";

type LazyMenuProps = {
  /** The button as it stands until it is pressed, and as the menu's trigger from then on. */
  button: ReactElement<ComponentProps<"button">>;
  /** The open menu around its trigger; its script is fetched when this is first rendered. */
  children: (trigger: ReactElement) => ReactNode;
};

/** A menu whose script is fetched when it is first opened: most pages are read without. */
export function LazyMenu({ button, children }: LazyMenuProps) {
  const [wanted, setWanted] = useState(false);
  const closed = cloneElement(button, { "aria-haspopup": "menu", "aria-expanded": false, onClick: () => setWanted(true) });
  return wanted ? <Suspense fallback={closed}>{children(button)}</Suspense> : closed;
}
