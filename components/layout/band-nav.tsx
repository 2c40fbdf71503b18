"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { cn } from "@/components/ui/cn";

export type Destination = { label: string; href: string };

/** Links to the destinations; the one that holds the present page is marked by weight and a rule under it. */
export function BandNav({ destinations, orientation }: { destinations: readonly Destination[]; orientation: "row" | "column" }) {
  const path = usePathname() ?? "";
  return (
    <nav aria-label="Main">
      <ul className={cn("flex", orientation === "row" ? "gap-0.5" : "flex-col")}>
        {destinations.map((destination) => {
          const here = path === destination.href || path.startsWith(`${destination.href}/`);
          return (
            <li key={destination.href}>
              <Link
                href={destination.href}
                aria-current={here ? "page" : undefined}
                className={cn(
                  "block px-2.5 text-sm whitespace-nowrap hover:text-water",
                  orientation === "row" ? "border-b-2 border-transparent py-1.5" : "border-l-2 border-transparent py-2.5",
                  here && "border-ink font-semibold",
                )}
              >
                {destination.label}
              </Link>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
