import { cn } from "@/components/ui/cn";
import { curvePath, levelCurves } from "./level-curves";

const markLevels = [-0.62, -0.28, 0.28, 0.62] as const;

/** The mark: level curves of x² - y² with a peg driven in at the saddle. Decorative unless it is given a title. */
export function Mark({ className, title }: { className?: string; title?: string }) {
  const named = title === undefined ? ({ "aria-hidden": true } as const) : ({ role: "img", "aria-label": title } as const);
  return (
    <svg viewBox="0 0 32 32" className={cn("size-8 shrink-0", className)} fill="none" {...named}>
      <rect x="1.5" y="1.5" width="29" height="29" rx="1.5" className="fill-sheet stroke-contour" strokeWidth="1" />
      <path d={curvePath(markLevels.flatMap((level) => levelCurves(level)), 13, 16, 16)} className="stroke-contour" strokeWidth="1.3" />
      <path d={curvePath(levelCurves(0), 13, 16, 16)} className="stroke-contour" strokeWidth="0.8" strokeDasharray="1.6 1.4" />
      <path d={pegPath} className="fill-peg stroke-sheet" strokeWidth="1" strokeLinejoin="round" />
    </svg>
  );
}

/** A peg whose tip stands on the saddle at (16, 16). */
export const pegPath = "M16 17.4L11.6 7.6H20.4Z";

/** The mark with the product's name. */
export function Wordmark({ className }: { className?: string }) {
  return (
    <span className={cn("inline-flex items-center gap-2.5 font-heading text-lg font-semibold tracking-tight", className)}>
      <Mark className="size-7" />
      Saddlemark
    </span>
  );
}
