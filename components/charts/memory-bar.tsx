import { cn } from "@/components/ui/cn";
import { formatGib, formatPercent, formatRange } from "@/lib/shared/format";
import { percent } from "./log-axis";
import type { RangeValues } from "./range-track";

type MemoryBarProps = { label: string; /** What the strategy needs, GiB over all processes. */ need: RangeValues; /** What the machine has, GiB. */ limitGiB: number; labelHidden?: boolean; className?: string };

export const memoryVerdicts = ["fits", "may-not-fit", "does-not-fit"] as const;
export type MemoryVerdict = (typeof memoryVerdicts)[number];

const looks: Record<MemoryVerdict, { colour: string; text: string }> = {
  fits: { colour: "var(--forest)", text: "Fits" },
  "may-not-fit": { colour: "var(--warn)", text: "May not fit" },
  "does-not-fit": { colour: "var(--bad)", text: "Does not fit" },
};

/** Memory needed against memory there is, on one linear axis with the limit as a line. Need beyond the drawing ends in an arrow. */
export function MemoryBar({ label, need, limitGiB, labelHidden = false, className }: MemoryBarProps) {
  const verdict = judgeMemory(need, limitGiB);
  const { colour, text } = looks[verdict];
  const end = Math.max(limitGiB * 1.25, Math.min(need.high * 1.05, limitGiB * 2)) || 1;
  const at = (value: number): number => Math.min(100, Math.max(0, (value / end) * 100));
  const beyond = need.high > end;
  const sentence = `${label}: needs ${formatGib(need.median)}, 80 % range ${formatRange(need.low, need.high, "gibibytes")}; the machine has ${formatGib(limitGiB)}. ${text}.`;
  return (
    <div className={cn("grid gap-1 text-sm", className)}>
      <div className="flex flex-wrap justify-between gap-x-4">
        <span className={cn(labelHidden && "sr-only")}>{label}</span>
        <span className="figures font-semibold" style={{ color: colour }}>
          {text}: {formatPercent(limitGiB > 0 ? need.median / limitGiB : null)} of the memory
        </span>
      </div>
      <svg role="img" aria-label={sentence} className="block h-6 w-full overflow-visible" style={{ color: colour }}>
        <rect x="0%" y="5" width={percent(at(limitGiB))} height="14" className="fill-wash stroke-hairline" />
        <rect x="0%" y="9" width={percent(at(need.median))} height="6" fill="currentColor" />
        <rect x={percent(Math.min(at(need.low), 99))} y="7" width={percent(Math.max(at(need.high) - at(need.low), 0.4))} height="10" fill="currentColor" fillOpacity="0.25" stroke="currentColor" />
        <line x1={percent(at(limitGiB))} x2={percent(at(limitGiB))} y1="0" y2="24" className="stroke-ink" strokeWidth="2" />
        {beyond && (
          <svg x="100%" y="12" className="overflow-visible">
            <path d="M-9-6L0 0L-9 6Z" fill="currentColor" className="stroke-sheet" />
          </svg>
        )}
      </svg>
      <div className="figures flex flex-wrap justify-between gap-x-4 text-xs text-faint">
        <span>
          needs {formatGib(need.median)} ({formatRange(need.low, need.high, "gibibytes")})
        </span>
        <span>line: machine has {formatGib(limitGiB)}</span>
      </div>
    </div>
  );
}

/** Fits when the whole range does; may not when only its upper end is over the limit. */
export function judgeMemory(need: RangeValues, limitGiB: number): MemoryVerdict {
  if (need.median > limitGiB) return "does-not-fit";
  return need.high > limitGiB ? "may-not-fit" : "fits";
}
