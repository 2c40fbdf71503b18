import type { ReactNode } from "react";
import { cn } from "@/components/ui/cn";
import { formatOf, formatPercent, formatRange } from "@/lib/shared/format";
import { percent } from "./log-axis";

type WilsonBarProps = {
  label: string;
  /** x of n with the ends of its 95 % Wilson interval, as fractions; n = 0 has no rate. */
  rate: { x: number; n: number; low: number; high: number };
  labelHidden?: boolean;
  /** Stands behind the label, such as a link to the cases. */
  action?: ReactNode;
  className?: string;
};

/** A rate with its interval and counts on a scale from 0 to 100 %. */
export function WilsonBar({ label, rate, labelHidden = false, action, className }: WilsonBarProps) {
  const known = rate.n > 0;
  const share = known ? rate.x / rate.n : null;
  const interval = formatRange(rate.low, rate.high, "fraction");
  const sentence = known ? `${label}: ${formatOf(rate.x, rate.n)}, ${formatPercent(share)}, 95 % interval ${interval}` : `${label}: no comparable runs yet`;
  return (
    <div className={cn("grid gap-1 text-sm", className)}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <span className="flex items-baseline gap-2">
          <span className={cn(labelHidden && "sr-only")}>{label}</span>
          {action}
        </span>
        <span className="figures">{known ? <RateText share={share} x={rate.x} n={rate.n} /> : <span className="text-faint">no comparable runs yet</span>}</span>
      </div>
      <svg role="img" aria-label={sentence} className="block h-5 w-full overflow-visible">
        {[0, 25, 50, 75, 100].map((tick) => (
          <line key={tick} x1={`${tick}%`} x2={`${tick}%`} y1="2" y2="18" className="stroke-hairline" strokeDasharray={tick % 50 === 0 ? undefined : "1 3"} />
        ))}
        <line x1="0%" x2="100%" y1="10" y2="10" className="stroke-hairline" />
        {known && (
          <g className="text-water">
            <rect x={percent(rate.low * 100)} width={percent((rate.high - rate.low) * 100)} y="6" height="8" fill="currentColor" fillOpacity="0.22" stroke="currentColor" />
            <line x1={percent((share ?? 0) * 100)} x2={percent((share ?? 0) * 100)} y1="1" y2="19" stroke="currentColor" strokeWidth="3" />
          </g>
        )}
      </svg>
      {known && (
        <div className="figures flex justify-between gap-x-4 text-xs text-faint">
          <span>95 % interval {interval}</span>
          <span>scale 0 to 100 %</span>
        </div>
      )}
    </div>
  );
}

function RateText({ share, x, n }: { share: number | null; x: number; n: number }) {
  return (
    <>
      <strong className="text-base font-semibold">{formatPercent(share)}</strong> <span className="text-faint">{formatOf(x, n)}</span>
    </>
  );
}
