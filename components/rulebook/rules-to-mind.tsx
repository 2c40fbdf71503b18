import { MarginSection } from "@/components/layout/sheet";
import type { RuleRecord } from "@/lib/refinement/rule-record";

const mostListed = 12;

/** Rules of the live edition that do nothing: they never fired, or others always overruled them. */
export function RulesToMind({ records }: { records: readonly RuleRecord[] }) {
  const groups = [
    { title: "Rules that never fired", of: records.filter(({ standing }) => standing === "never-fires") },
    { title: "Rules always overruled", of: records.filter(({ standing }) => standing === "always-overruled") },
  ];
  return groups.map(({ title, of }) =>
    of.length === 0 ? null : (
      <MarginSection key={title} title={title}>
        <ul className="grid gap-1">
          {of.slice(0, mostListed).map(({ ruleId, title: name }) => (
            <li key={ruleId}><a href={`#${ruleId}`} className="prose-link">{name}</a></li>
          ))}
          {of.length > mostListed && <li className="text-faint">and {of.length - mostListed} more</li>}
        </ul>
      </MarginSection>
    ),
  );
}
