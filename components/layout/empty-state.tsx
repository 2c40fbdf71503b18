import type { ReactNode } from "react";
import { Contours } from "./contours";

/** A page with nothing on it yet: what belongs here and what to do first. */
export function EmptyState({ title, text, action }: { title: string; text: ReactNode; action?: ReactNode }) {
  return (
    <div className="relative isolate overflow-hidden border border-hairline px-6 py-14 sm:px-10 sm:py-20">
      <Contours className="absolute inset-0 -z-10 size-full opacity-35" />
      <div className="mx-auto grid max-w-md justify-items-center gap-3 bg-sheet px-6 py-6 text-center">
        <h2 className="text-xl font-semibold">{title}</h2>
        <p className="text-faint">{text}</p>
        {action !== undefined && <div className="mt-2 flex flex-wrap justify-center gap-2">{action}</div>}
      </div>
    </div>
  );
}
