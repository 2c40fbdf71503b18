import { formatOf, formatPercent, formatRange } from "@/lib/shared/format";
import { leastCasesForRate } from "@/lib/hit-rates/definitions";
import type { Rate } from "@/lib/hit-rates/rates";

/** "79 %, 41 of 52", or the count alone where cases are too few for a rate. */
export function RateText({ rate }: { rate: Rate }) {
  if (rate.n === 0) return <span className="text-faint">–</span>;
  if (rate.n < leastCasesForRate) return <span>{formatOf(rate.x, rate.n)}</span>;
  return (
    <span title={`95 % interval ${formatRange(rate.low, rate.high, "fraction")}`}>
      <span className="font-semibold">{formatPercent(rate.x / rate.n)}</span> <span className="text-xs text-faint">{formatOf(rate.x, rate.n)}</span>
    </span>
  );
}
