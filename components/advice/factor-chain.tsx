import { Quantity } from "@/components/ui/quantity";
import type { RankingEntry } from "@/lib/advice/advice";
import { formatRatio } from "@/lib/shared/format";
import { sourceText } from "./source-text";

/** The chain from the model's time to the result: model, rules, priority, evidence. Factors of 1 give a reason only. */
export function FactorChain({ entry }: { entry: RankingEntry }) {
  const product = entry.factors.reduce((all, factor) => all * factor.factor, 1);
  return (
    <ol className="grid gap-1.5 text-sm">
      <Step kind="Model" value={<Quantity value={entry.estimate.totalSeconds.median} unit="seconds" />}>
        Predicted time for all solves, set-up included.
      </Step>
      {entry.factors.map((factor, index) => (
        <Step key={index} kind={kindWords[factor.kind]} value={factor.factor === 1 ? "reason only" : `× ${formatRatio(factor.factor).replace(/x$/, "")}`}>
          {factor.text}
          {factor.source !== null && <span className="block text-faint">Source: {sourceText(factor.source)}</span>}
        </Step>
      ))}
      {entry.evidenceRuns === 0 && (
        <Step kind="Evidence" value="none yet">
          No recorded run of the team speaks about this strategy.
        </Step>
      )}
      <Step kind="Result" value={<Quantity value={entry.estimate.totalSeconds.median * product} unit="seconds" />} strong>
        {entry.relativeTime === null ? "Not ranked." : entry.rank === 1 ? "The first; the others are measured against it." : `${formatRatio(entry.relativeTime)} the time of the first.`}
      </Step>
    </ol>
  );
}

const kindWords: Record<RankingEntry["factors"][number]["kind"], string> = { rule: "Rule", evidence: "Evidence", priority: "Priority" };

function Step({ kind, value, strong = false, children }: { kind: string; value: React.ReactNode; strong?: boolean; children: React.ReactNode }) {
  return (
    <li className={`grid grid-cols-[4.5rem_minmax(0,1fr)_auto] gap-x-3 border-b border-hairline pb-1.5 last:border-0 ${strong ? "font-semibold" : ""}`}>
      <span className="text-faint">{kind}</span>
      <span className="min-w-0">{children}</span>
      <span className="figures text-right whitespace-nowrap">{value}</span>
    </li>
  );
}
