"use client";

import { useDeferredValue, useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { RuleRecord as RuleRecordFigures } from "@/lib/refinement/rule-record";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { strategyNames } from "@/lib/strategies/strategy-names";
import { describeCondition, describeEffect, describeSource } from "@/rules/describe";
import type { Rule, RuleSet } from "@/rules/rule-schema";
import { RuleEntry } from "./rule-entry";
import { RuleRecord } from "./rule-record";

type RuleBrowserProps = { rules: RuleSet; fired: Readonly<Record<string, number>>; /** By rule id; those of the live edition only. */ records: Readonly<Record<string, RuleRecordFigures>> };

/** Rules of an edition with a filter by words and by strategy. Long lists are drawn as they come into view. */
export function RuleBrowser({ rules, fired, records }: RuleBrowserProps) {
  const [text, setText] = useState("");
  const [strategy, setStrategy] = useState("");
  const wanted = useDeferredValue(text.trim().toLowerCase());
  const searchable = useMemo(() => rules.map((rule) => ({ rule, words: wordsOf(rule), strategies: strategiesOf(rule) })), [rules]);
  const shown = searchable.filter(({ words, strategies }) => words.includes(wanted) && (strategy === "" || strategies.has(strategy)));
  const filtered = wanted !== "" || strategy !== "";
  return (
    <section aria-labelledby="rules" className="grid grid-cols-1 gap-2">
      <h2 id="rules" className="text-lg font-semibold">Rules</h2>
      <form role="search" aria-label="Filter the rules" className="grid grid-cols-1 items-end gap-3 sm:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_auto]" onSubmit={(event) => event.preventDefault()} data-screen-only>
        <Field label="Words">
          <Input type="search" value={text} maxLength={120} placeholder="Title, fact, effect, source" onChange={(event) => setText(event.target.value)} />
        </Field>
        <Field label="Strategy">
          <Select value={strategy} onChange={(event) => setStrategy(event.target.value)}>
            <option value="">Any</option>
            {strategyIds.map((id) => (
              <option key={id} value={id}>{strategyNames[id]}</option>
            ))}
          </Select>
        </Field>
        <Button variant="quiet" disabled={!filtered} onClick={() => { setText(""); setStrategy(""); }}>Clear the filter</Button>
      </form>
      <p role="status" className="text-sm text-faint">{filtered ? `${shown.length} of ${rules.length} rules` : `${rules.length} rules, in the order in which they are read`}</p>
      <div>
        {shown.map(({ rule }) => (
          <div key={rule.id} className="[contain-intrinsic-size:auto_14rem] [content-visibility:auto] print:[content-visibility:visible]">
            <RuleEntry rule={rule} record={<RuleRecord fired={fired[rule.id] ?? 0} record={records[rule.id] ?? null} />} />
          </div>
        ))}
      </div>
      {shown.length === 0 && <p className="py-6 text-faint">{rules.length === 0 ? "This edition has no rule." : "No rule fits this filter."}</p>}
    </section>
  );
}

function wordsOf(rule: Rule): string {
  const effects = rule.then.map((effect) => describeEffect(effect, (id) => `${id} ${strategyNames[id]}`));
  return [rule.id, rule.title, describeCondition(rule.when), ...effects, rule.rationale, describeSource(rule.source)].join("\n").toLowerCase();
}

function strategiesOf(rule: Rule): ReadonlySet<string> {
  return new Set(rule.then.flatMap((effect) => (effect.kind === "fallback" ? [effect.strategy, effect.to] : effect.strategy === null ? [] : [effect.strategy])));
}
