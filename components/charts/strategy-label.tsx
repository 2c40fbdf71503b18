import { cn } from "@/components/ui/cn";
import { isStrategyId } from "@/lib/shared/strategy-id-list";
import { strategyName } from "@/lib/strategies/strategy-names";
import { StrategyMark } from "./strategy-mark";

/** A strategy's mark and trade name. `otherName` is the name of a recorded strategy that is none of ours. */
export function StrategyLabel({ strategy, otherName, className }: { strategy: string; otherName?: string | null; className?: string }) {
  return (
    <span className={cn("inline-flex items-baseline gap-1.5", className)}>
      <StrategyMark id={isStrategyId(strategy) ? strategy : "other"} className="self-center" />
      <span>{strategyName(strategy, otherName)}</span>
    </span>
  );
}
