import { Badge } from "@/components/ui/badge";
import type { RuleDifference } from "@/lib/refinement/diff-rule-sets";

const looks: Record<RuleDifference["kind"], { word: string; tone: "forest" | "bad" | "water" }> = {
  added: { word: "new", tone: "forest" },
  removed: { word: "removed", tone: "bad" },
  changed: { word: "changed", tone: "water" },
};

/** What differs between two sets of rules, rule by rule in words. */
export function DifferenceList({ differences, none }: { differences: readonly RuleDifference[]; /** Said where nothing differs. */ none: string }) {
  if (differences.length === 0) return <p className="text-sm text-faint">{none}</p>;
  return (
    <ol className="grid gap-4">
      {differences.map(({ ruleId, title, kind, changes }) => (
        <li key={`${kind}-${ruleId}`} className="grid gap-1 border-l-2 border-contour pl-4" data-keep-together>
          <p className="flex flex-wrap items-baseline gap-x-3">
            <span className="font-semibold">{title}</span>
            <Badge tone={looks[kind].tone}>{looks[kind].word}</Badge>
            <span className="font-mono text-xs text-faint">{ruleId}</span>
          </p>
          <ul className="grid gap-1 text-sm">
            {changes.map(({ text }, index) => (
              <li key={index} className="min-w-0 break-words">{text}</li>
            ))}
          </ul>
        </li>
      ))}
    </ol>
  );
}
