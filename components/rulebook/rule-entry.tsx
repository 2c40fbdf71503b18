import type { ReactNode } from "react";
import { sourceText } from "@/components/advice/source-text";
import { Badge } from "@/components/ui/badge";
import { strategyName } from "@/lib/strategies/strategy-names";
import { describeCondition, describeEffect } from "@/rules/describe";
import type { Rule } from "@/rules/rule-schema";

/** One rule in words: when, then, because, source. `record` says how often it fired. */
export function RuleEntry({ rule, record }: { rule: Rule; record: ReactNode }) {
  return (
    <article id={rule.id} data-keep-together className="grid grid-cols-1 gap-x-6 gap-y-2 border-b border-hairline py-4 lg:grid-cols-[minmax(0,1fr)_11rem]">
      <div className="grid min-w-0 grid-cols-1 gap-2 text-sm">
        <h3 className="flex flex-wrap items-baseline gap-x-3 text-base font-semibold">
          {rule.title}
          {!rule.enabled && <Badge tone="faint">switched off</Badge>}
        </h3>
        <dl className="grid grid-cols-[4.5rem_minmax(0,1fr)] gap-x-3 gap-y-1">
          <Line term="When">{describeCondition(rule.when)}</Line>
          <Line term="Then">
            <ul className="grid gap-0.5">
              {rule.then.map((effect, index) => (
                <li key={index}>{describeEffect(effect, strategyName)}</li>
              ))}
            </ul>
          </Line>
          <Line term="Because">{rule.rationale}</Line>
          <Line term="Source">
            <span className="text-faint">{sourceText(rule.source)}</span>
          </Line>
        </dl>
        <p className="font-mono text-xs break-all text-faint">{rule.id}</p>
      </div>
      <div className="text-sm lg:text-right">{record}</div>
    </article>
  );
}

function Line({ term, children }: { term: string; children: ReactNode }) {
  return (
    <>
      <dt className="text-faint">{term}</dt>
      <dd className="min-w-0 break-words">{children}</dd>
    </>
  );
}
