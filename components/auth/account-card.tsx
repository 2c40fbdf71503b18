import type { ReactNode } from "react";

/** The sheet of one short form on a public page. */
export function AccountCard({ title, below, children, foot }: { title: string; below?: ReactNode; children: ReactNode; foot?: ReactNode }) {
  return (
    <div className="mx-auto w-full max-w-md px-3 py-8 sm:py-14">
      <div className="neatline grid content-start gap-5 px-5 py-6 sm:px-8 sm:py-8">
        <header className="grid gap-1.5">
          <h1 className="text-2xl font-semibold tracking-tight">{title}</h1>
          {below !== undefined && <div className="text-sm text-faint">{below}</div>}
        </header>
        {children}
        {foot !== undefined && <div className="grid gap-1.5 border-t border-hairline pt-4 text-sm">{foot}</div>}
      </div>
    </div>
  );
}
