import type { ReactNode } from "react";

/** The page's one h1 with what stands beside it. */
export function PageTitle({ title, above, below, actions }: { title: ReactNode; above?: ReactNode; below?: ReactNode; actions?: ReactNode }) {
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-6 gap-y-4">
      <div className="grid min-w-0 gap-1.5">
        {above}
        <h1 className="text-2xl font-semibold tracking-tight sm:text-3xl">{title}</h1>
        {below !== undefined && <div className="max-w-measure text-faint">{below}</div>}
      </div>
      {actions !== undefined && (
        <div className="flex flex-wrap gap-2" data-screen-only>
          {actions}
        </div>
      )}
    </header>
  );
}
