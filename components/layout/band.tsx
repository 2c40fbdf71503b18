import Link from "next/link";
import type { ReactNode } from "react";
import { BandMenu } from "./band-menu";
import { BandNav, type Destination } from "./band-nav";
import { Wordmark } from "./mark";

type BandProps = {
  /** Cases, Terrain, Hit rates, Rulebook, Pilot trials, as far as they exist. */
  destinations: readonly Destination[];
  home?: string;
  /** The team switcher. */
  teams?: ReactNode;
  /** The find button. */
  find?: ReactNode;
  /** The person's menu. */
  person?: ReactNode;
};

/** The one band at the top: mark, team, destinations, find, person. Below 1024 px the destinations wait behind a disclosure. */
export function Band({ destinations, home = "/cases", teams, find, person }: BandProps) {
  return (
    <header className="border-b border-contour bg-paper shadow-[0_3px_0_0_var(--paper),0_4px_0_0_var(--hairline)] print:hidden">
      <div className="mx-auto flex min-h-14 w-full max-w-desk flex-wrap items-center gap-x-3 px-3 sm:px-6">
        <Link href={home} className="rounded-sheet py-1.5" aria-label="Saddlemark, home">
          <Wordmark />
        </Link>
        {teams !== undefined && <div className="hidden min-w-0 border-l border-hairline pl-3 sm:block">{teams}</div>}
        {destinations.length > 0 && (
          <div className="ml-2 hidden lg:block">
            <BandNav destinations={destinations} orientation="row" />
          </div>
        )}
        <div className="ml-auto flex items-center gap-1.5">
          {find}
          {person}
        </div>
        {(destinations.length > 0 || teams !== undefined) && (
          <BandMenu>
            {teams !== undefined && <div className="pb-3 sm:hidden">{teams}</div>}
            <BandNav destinations={destinations} orientation="column" />
          </BandMenu>
        )}
      </div>
    </header>
  );
}
