import Link from "next/link";
import { RateText } from "@/components/hit-rates/rate-text";
import { Badge } from "@/components/ui/badge";
import type { RuleRecord as RuleRecordFigures, RuleStanding } from "@/lib/refinement/rule-record";
import { formatCount } from "@/lib/shared/format";

const standings: Record<RuleStanding, { word: string; tone: "warn" | "faint" } | null> = {
  active: null,
  "never-fires": { word: "never fires", tone: "warn" },
  "always-overruled": { word: "always overruled", tone: "warn" },
  off: null,
};

/** How often a rule fired in advice under the edition shown, and what came of the cases in which it did. */
export function RuleRecord({ fired, record }: { fired: number; record: RuleRecordFigures | null }) {
  const standing = record === null ? null : standings[record.standing];
  return (
    <dl className="grid grid-cols-[1fr_auto] gap-x-3 gap-y-0.5 lg:grid-cols-1 lg:gap-y-1">
      <dt className="text-faint">Fired</dt>
      <dd className="figures text-right font-medium">{formatCount(fired)} times</dd>
      {record !== null && record.fired > 0 && (
        <>
          <dt className="text-faint">Cases, followed</dt>
          <dd className="figures text-right">
            <Link className="prose-link" href={`/cases?rule=${record.ruleId}`}>{formatCount(record.fired)}</Link>, <Link className="prose-link" href={`/cases?rule=${record.ruleId}&result=judged`}>{formatCount(record.followed)}</Link>
          </dd>
          <dt className="text-faint">Right, wrong</dt>
          <dd className="figures text-right"><RateText rate={record.right} />, {formatCount(record.wrong)}</dd>
          {record.overruled !== null && (
            <>
              <dt className="text-faint">Overruled</dt>
              <dd className="figures text-right">{formatCount(record.overruled)}</dd>
            </>
          )}
          {record.drift !== null && <dd className="col-span-full text-xs text-faint">{record.driftText}</dd>}
        </>
      )}
      {standing !== null && <dd className="col-span-full"><Badge tone={standing.tone}>{standing.word}</Badge></dd>}
    </dl>
  );
}
