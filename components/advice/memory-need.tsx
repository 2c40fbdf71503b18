import { formatExact, formatGib } from "@/lib/shared/format";
import type { Range } from "@/lib/shared/range";

/** Memory needed against what the machine has: a bar filled to the median, its upper end marked, and words when it is tight. */
export function MemoryNeed({ memory, availableGiB }: { memory: Range; availableGiB: number }) {
  const share = (value: number) => Math.min(100, (100 * value) / availableGiB);
  const tight = memory.high > availableGiB ? "may not fit" : memory.high > 0.8 * availableGiB ? "near the limit" : null;
  const words = `${formatExact(memory.median, "gibibytes")} of ${formatExact(availableGiB, "gibibytes")}, at most about ${formatGib(memory.high)}`;
  return (
    <span className="inline-grid gap-0.5" title={words}>
      <span className="figures">
        {formatGib(memory.median)}
        <span className="sr-only"> of {formatGib(availableGiB)}</span>
        {tight !== null && <span className="ml-1 font-medium text-warn">{tight}</span>}
      </span>
      <span aria-hidden className="relative block h-1.5 w-28 border border-hairline lg:ml-auto">
        <span className={`absolute inset-y-0 left-0 ${tight === null ? "bg-water" : "bg-warn"}`} style={{ width: `${share(memory.median)}%` }} />
        <span className="absolute inset-y-0 w-px bg-ink" style={{ left: `${share(memory.high)}%` }} />
      </span>
    </span>
  );
}
