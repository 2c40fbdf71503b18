"use client";

import { useState, type FormEvent, type ReactNode } from "react";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import type { TrialView } from "@/lib/api/contract/drafts";
import { formatRatio } from "@/lib/shared/format";
import { describeValue } from "@/rules/describe";
import { factDefinitions } from "@/rules/facts";
import type { Rule } from "@/rules/rule-schema";
import { TraceTree } from "./trace-tree";

type TryPanelProps = { rule: Rule | null; trial: TrialView | null; /** What stands in place of a result: waiting, a refusal. */ notice: ReactNode; onChoose: (caseNumber: string) => void };

/** The rules in the making on one case: which part of the chosen rule holds, what would come first, and every fact. */
export function TryPanel({ rule, trial, notice, onChoose }: TryPanelProps) {
  return (
    <div className="grid min-w-0 gap-4">
      <CaseChoice onChoose={onChoose} />
      {notice}
      {trial !== null && (
        <>
          <p className="text-sm">
            <span className="font-semibold">Case {trial.case.number}</span> {trial.case.title}
          </p>
          {rule !== null && (
            <section aria-label="The chosen rule on this case" className="grid gap-2">
              <h4 className="text-sm font-semibold">{rule.title}</h4>
              <TraceTree condition={rule.when} facts={trial.facts} />
              {!rule.enabled && <p className="text-sm text-faint">It is switched off and does nothing.</p>}
            </section>
          )}
          <Rankings trial={trial} />
          <FiredRules trial={trial} />
          <FactTable facts={trial.facts} />
        </>
      )}
    </div>
  );
}

function CaseChoice({ onChoose }: { onChoose: (caseNumber: string) => void }) {
  const [text, setText] = useState("");
  const [error, setError] = useState<string | undefined>(undefined);
  function submit(event: FormEvent): void {
    event.preventDefault();
    const valid = /^[1-9]\d{0,8}$/.test(text.trim());
    setError(valid ? undefined : "Write the number of a case, such as 12.");
    if (valid) onChoose(text.trim());
  }
  return (
    <form onSubmit={submit} className="flex flex-wrap items-end gap-2">
      <Field label="Case number" error={error} className="w-32">
        <Input inputMode="numeric" value={text} onChange={(event) => setText(event.target.value)} />
      </Field>
      <Button type="submit">Try it</Button>
    </form>
  );
}

function Rankings({ trial }: { trial: TrialView }) {
  const lists = [
    { name: "Under this draft", ranking: trial.ranking },
    { name: `Under edition ${trial.live.number}, live`, ranking: trial.live.ranking },
  ];
  return (
    <section aria-label="Ranking" className="grid gap-3">
      {lists.map(({ name, ranking }) => (
        <div key={name} className="grid gap-1 text-sm">
          <h4 className="font-semibold">{name}</h4>
          {ranking.length === 0 ? (
            <p className="text-faint">No strategy may compete.</p>
          ) : (
            <ol className="grid gap-0.5">
              {ranking.slice(0, 4).map(({ strategy, relativeTime }) => (
                <li key={strategy} className="flex items-baseline justify-between gap-3">
                  <StrategyLabel strategy={strategy} />
                  <span className="figures text-faint">{formatRatio(relativeTime)}</span>
                </li>
              ))}
            </ol>
          )}
        </div>
      ))}
    </section>
  );
}

function FiredRules({ trial }: { trial: TrialView }) {
  const fired = trial.rules.filter(({ truth }) => truth === "true");
  return (
    <p className="text-sm">
      <span className="font-semibold">{fired.length} of {trial.rules.length} rules fire:</span> <span className="font-mono text-xs break-words">{fired.map(({ rule }) => rule).join(", ")}</span>
    </p>
  );
}

function FactTable({ facts }: { facts: TrialView["facts"] }) {
  return (
    <details>
      <summary className="text-sm text-water underline underline-offset-3">All facts of this case</summary>
      <dl className="mt-2 grid gap-0.5 text-sm">
        {factDefinitions.map((definition) => {
          const value = facts[definition.name];
          return (
            <div key={definition.name} className="flex items-baseline justify-between gap-3">
              <dt className="text-faint" title={definition.description}>{definition.label}</dt>
              <dd className="figures min-w-0 text-right break-words">{value === undefined ? "–" : describeValue(value, definition) || "none"}</dd>
            </div>
          );
        })}
      </dl>
    </details>
  );
}
