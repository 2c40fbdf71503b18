import { cn } from "@/components/ui/cn";
import { curvePath, levelCurves } from "./level-curves";

const levels = Array.from({ length: 19 }, (_, index) => (index - 9) / 10).filter((level) => level !== 0);

/** Faint contours of the saddle that fill their box; a background, never information. Every fifth line is drawn heavier, as on a map. */
export function Contours({ className }: { className?: string }) {
  const heavy = levels.filter((level) => Math.abs(Math.abs(level) - 0.5) < 1e-9);
  const light = levels.filter((level) => Math.abs(Math.abs(level) - 0.5) >= 1e-9);
  const path = (chosen: readonly number[]): string => curvePath(chosen.flatMap((level) => levelCurves(level, 32)), 500, 500, 500);
  return (
    <svg viewBox="0 0 1000 1000" preserveAspectRatio="none" className={cn("pointer-events-none text-contour", className)} fill="none" stroke="currentColor" aria-hidden>
      <path d={path(light)} strokeWidth="0.8" vectorEffect="non-scaling-stroke" opacity="0.55" />
      <path d={path(heavy)} strokeWidth="1.6" vectorEffect="non-scaling-stroke" opacity="0.65" />
      <path d={curvePath(levelCurves(0), 500, 500, 500)} strokeWidth="0.8" strokeDasharray="5 4" vectorEffect="non-scaling-stroke" opacity="0.55" />
    </svg>
  );
}
