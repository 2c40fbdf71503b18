import Link from "next/link";
import type { ReactNode } from "react";
import { version } from "@/package.json";
import { Wordmark } from "./mark";
import { SkipLink } from "./skip-link";
import { ThemeToggle } from "./theme-toggle";

/** The frame of pages that need no sign-in. `actions` stand at the band's right end. */
export function PublicShell({ actions, children }: { actions?: ReactNode; children: ReactNode }) {
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header className="border-b border-contour shadow-[0_3px_0_0_var(--paper),0_4px_0_0_var(--hairline)] print:hidden">
        <div className="mx-auto flex min-h-14 w-full max-w-desk items-center gap-3 px-3 sm:px-6">
          <Link href="/" className="rounded-sheet py-1.5" aria-label="Saddlemark, front page">
            <Wordmark />
          </Link>
          <div className="ml-auto flex items-center gap-2">
            {actions}
            <ThemeToggle />
          </div>
        </div>
      </header>
      <main id="work" tabIndex={-1} className="flex-1 outline-0">
        {children}
      </main>
      <footer className="mx-auto w-full max-w-desk px-4 py-6 text-sm text-faint sm:px-7">
        <p className="flex flex-wrap justify-between gap-x-6 gap-y-1 border-t border-hairline pt-3">
          <span>Saddlemark {version}, MIT licence</span>
          <span>Advice is an estimate from models and past runs, not a guarantee.</span>
        </p>
      </footer>
    </div>
  );
}
