import { StrategyLabel } from "@/components/charts/strategy-label";
import { Badge } from "@/components/ui/badge";
import type { RankingEntry } from "@/lib/advice/advice";

const statusWords: Record<Exclude<RankingEntry["status"], "ranked">, { word: string; tone: "bad" | "faint" | "warn" }> = {
  infeasible: { word: "does not fit", tone: "bad" },
  unavailable: { word: "not available", tone: "faint" },
  excluded: { word: "excluded by a rule", tone: "warn" },
};

/** Strategies that may not compete, each with the reason. */
export function BelowTheLine({ entries }: { entries: readonly RankingEntry[] }) {
  return (
    <ul className="grid gap-0">
      {entries.map((entry) => {
        if (entry.status === "ranked") return null;
        const { word, tone } = statusWords[entry.status];
        return (
          <li key={entry.strategy} className="grid gap-x-4 gap-y-1 border-b border-hairline py-2 text-sm sm:grid-cols-[minmax(0,15rem)_8.5rem_minmax(0,1fr)]" data-strategy={entry.strategy}>
            <StrategyLabel strategy={entry.strategy} className="self-start" />
            <span>
              <Badge tone={tone}>{word}</Badge>
            </span>
            <span className="text-faint">{entry.reason}</span>
          </li>
        );
      })}
    </ul>
  );
}
