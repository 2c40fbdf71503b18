import type { ReactNode } from "react";
import { Band } from "./band";
import type { Destination } from "./band-nav";
import { DemonstrationRibbon } from "./demonstration-ribbon";
import { Wordmark } from "./mark";
import { SkipLink } from "./skip-link";

type DeskShellProps = {
  destinations: readonly Destination[];
  teams?: ReactNode;
  find?: ReactNode;
  person?: ReactNode;
  /** True for teams whose data is invented. */
  demonstration?: boolean;
  children: ReactNode;
};

/** The frame of every signed-in page. */
export function DeskShell({ destinations, teams, find, person, demonstration = false, children }: DeskShellProps) {
  return (
    <>
      <SkipLink />
      <Band destinations={destinations} teams={teams} find={find} person={person} />
      {/* On paper the band goes and the mark stays. */}
      <div className="hidden border-b border-contour pb-2 print:block">
        <Wordmark />
      </div>
      {demonstration && <DemonstrationRibbon />}
      <main id="work" tabIndex={-1} className="outline-0">
        {children}
      </main>
    </>
  );
}
