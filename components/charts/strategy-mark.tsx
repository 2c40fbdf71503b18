import { cn } from "@/components/ui/cn";
import { strategyColours, strategyHatches, strategyShapes, type StrategyMarkId } from "./strategy-identity";

type StrategyMarkProps = { id: StrategyMarkId; /** Names the mark where no text beside it does. */ title?: string; hollow?: boolean; className?: string };

/** A strategy's sign: its own shape in its own colour. */
export function StrategyMark({ id, title, hollow = false, className }: StrategyMarkProps) {
  const named = title === undefined ? ({ "aria-hidden": true } as const) : ({ role: "img", "aria-label": title } as const);
  return (
    <svg viewBox="-7 -7 14 14" className={cn("inline-block size-4 shrink-0 align-[-0.15em]", className)} {...named}>
      <StrategyShape id={id} hollow={hollow} />
    </svg>
  );
}

/** The sign inside another drawing, centred at its origin. The rim in sheet colour keeps it readable on lines. */
export function StrategyShape({ id, hollow = false, rim = false }: { id: StrategyMarkId; hollow?: boolean; rim?: boolean }) {
  const { path, drawing } = strategyShapes[id];
  const style = { color: strategyColours[id] };
  if (drawing === "line") {
    return (
      <g style={style} fill="none" strokeLinecap="butt">
        {rim && <path d={path} className="stroke-sheet" strokeWidth="5" />}
        <path d={path} stroke="currentColor" strokeWidth={hollow ? 1.2 : 2.6} strokeDasharray={hollow ? "2 1.4" : undefined} />
      </g>
    );
  }
  if (hollow) return <path d={path} style={style} className="fill-sheet" stroke="currentColor" strokeWidth="1.6" />;
  return (
    <g style={style}>
      {rim && <path d={path} className="fill-sheet stroke-sheet" strokeWidth="2.5" strokeLinejoin="round" />}
      <path d={path} fill="currentColor" fillRule="evenodd" />
    </g>
  );
}

/** Pattern definitions for areas; fill with `hatchFill(prefix, id)`. `prefix` keeps two drawings on a page apart. */
export function StrategyHatches({ prefix, ids }: { prefix: string; ids: readonly StrategyMarkId[] }) {
  return (
    <defs>
      {ids.map((id) => (
        <pattern key={id} id={`${prefix}-${id}`} width="12" height="12" patternUnits="userSpaceOnUse" style={{ color: strategyColours[id] }}>
          <rect width="12" height="12" fill="currentColor" opacity="0.14" />
          <path d={strategyHatches[id].path} fill="none" stroke="currentColor" strokeWidth={strategyHatches[id].strokeWidth} opacity="0.75" />
        </pattern>
      ))}
    </defs>
  );
}

export function hatchFill(prefix: string, id: StrategyMarkId): string {
  return `url(#${prefix}-${id})`;
}
