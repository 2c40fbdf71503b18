import { cn } from "@/components/ui/cn";
import { curvePath, levelCurves } from "./level-curves";

const levels = Array.from({ length: 19 }, (_, index) => (index - 9) / 10).filter((level) => level !== 0);
const labelled = [-0.8, -0.5, -0.2, 0.2, 0.5, 0.8] as const;

/** The saddle as a surveyor would draw it: contours of x² - y² with their levels written into the lines, and the peg. */
export function SaddleFigure({ className }: { className?: string }) {
  return (
    <svg viewBox="-18 -18 436 436" className={cn("figures w-full", className)} role="img" aria-label="Contour lines of x² − y² with a peg at the saddle">
      <rect x="0" y="0" width="400" height="400" className="fill-none stroke-contour" />
      <Graticule />
      <g className="fill-none stroke-contour">
        {levels.map((level) => (
          <path key={level} d={curvePath(levelCurves(level, 40), 200, 200, 200)} strokeWidth={Math.abs(level) === 0.5 ? 1.8 : 0.8} />
        ))}
        <path d={curvePath(levelCurves(0), 200, 200, 200)} strokeWidth="0.8" strokeDasharray="6 4" />
      </g>
      {labelled.map((level) => (
        <LevelLabel key={level} level={level} />
      ))}
      <path d="M200 203L189 176H211Z" className="fill-peg stroke-sheet" strokeWidth="2.5" strokeLinejoin="round" />
      <circle cx="200" cy="203" r="1.8" className="fill-ink" />
    </svg>
  );
}

/** The level stands on its own line where that crosses an axis, alternating sides so that no two labels are neighbours. */
function LevelLabel({ level }: { level: number }) {
  const reach = 200 * Math.sqrt(Math.abs(level));
  const [x, y] = level > 0 ? [200 + reach, 200] : [200, 200 + reach];
  return (
    <text x={x} y={y} textAnchor="middle" dominantBaseline="central" fontSize="19" className="fill-ink stroke-sheet" strokeWidth="7" paintOrder="stroke" transform={level > 0 ? `rotate(-90 ${x} ${y})` : undefined}>
      {String(level).replace("-", "−")}
    </text>
  );
}

function Graticule() {
  const stops = [-1, -0.5, 0, 0.5, 1];
  return (
    <g className="stroke-contour">
      {stops.map((stop) => (
        <g key={stop}>
          <line x1={200 + 200 * stop} x2={200 + 200 * stop} y1="-7" y2="0" />
          <line x1={200 + 200 * stop} x2={200 + 200 * stop} y1="400" y2="407" />
          <line x1="-7" x2="0" y1={200 + 200 * stop} y2={200 + 200 * stop} />
          <line x1="400" x2="407" y1={200 + 200 * stop} y2={200 + 200 * stop} />
        </g>
      ))}
      <rect x="-7" y="-7" width="414" height="414" className="fill-none" strokeWidth="0.6" />
    </g>
  );
}
