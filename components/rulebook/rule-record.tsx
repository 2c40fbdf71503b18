import Link from "next/link";
import { RateText } from "@/components/hit-rates/rate-text";
import type { HitRateGroup } from "@/lib/hit-rates/hit-rates";
import { formatCount } from "@/lib/shared/format";

/** How often a rule fired in advice under the edition shown, and what came of the cases in which it did. */
export function RuleRecord({ fired, group }: { fired: number; group: HitRateGroup | null }) {
  const rule = group?.rule ?? null;
  return (
    <dl className="grid grid-cols-[1fr_auto] gap-x-3 gap-y-0.5 lg:grid-cols-1 lg:gap-y-1">
      <dt className="text-faint">Fired</dt>
      <dd className="figures text-right font-medium">{formatCount(fired)} times</dd>
      {rule !== null && group !== null && (
        <>
          <dt className="text-faint">Cases, followed</dt>
          <dd className="figures text-right">
            <Link className="prose-link" href={`/cases?rule=${group.key}`}>{formatCount(rule.fired)}</Link>, <Link className="prose-link" href={`/cases?rule=${group.key}&result=judged`}>{formatCount(rule.followed)}</Link>
          </dd>
          <dt className="text-faint">Right</dt>
          <dd className="figures text-right"><RateText rate={rule.right} /></dd>
        </>
      )}
    </dl>
  );
}
