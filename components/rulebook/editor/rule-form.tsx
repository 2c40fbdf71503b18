"use client";

import { Plus } from "lucide-react";
import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { CheckboxLine } from "@/components/ui/checkbox";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Textarea } from "@/components/ui/textarea";
import type { Rule } from "@/rules/rule-schema";
import { ConditionEditor } from "./condition-editor";
import { blankEffect } from "./effect-changes";
import { EffectEditor } from "./effect-editor";
import { ProblemsAt, useErrorAt, type ParameterCatalogue } from "./rule-problems";
import { SourceEditor } from "./source-editor";

type RuleFormProps = { rule: Rule; /** Place of the rule, as problems name it. */ path: string; catalogue: ParameterCatalogue; disabled: boolean; onChange: (rule: Rule, merge?: string) => void };

const mostEffects = 20;

/** One rule as a form: name, when, then, because, source. Each problem stands where it belongs. */
export function RuleForm({ rule, path, catalogue, disabled, onChange }: RuleFormProps) {
  const errors = { title: useErrorAt(`${path}.title`), id: useErrorAt(`${path}.id`), rationale: useErrorAt(`${path}.rationale`) };
  const setEffects = (then: Rule["then"], merge?: string) => onChange({ ...rule, then }, merge);
  return (
    <fieldset disabled={disabled} className="grid min-w-0 gap-6">
      <legend className="sr-only">{rule.title}</legend>
      <div className="grid gap-3 sm:grid-cols-[minmax(0,1fr)_14rem]">
        <Field label="Title" error={errors.title}>
          <Input value={rule.title} maxLength={160} onChange={(event) => onChange({ ...rule, title: event.target.value }, `${path}.title`)} />
        </Field>
        <Field label="Id" error={errors.id} hint="stable, lower case">
          <Input className="font-mono text-sm" value={rule.id} maxLength={80} spellCheck={false} onChange={(event) => onChange({ ...rule, id: event.target.value }, `${path}.id`)} />
        </Field>
      </div>
      <CheckboxLine label="Switched on" help="A rule that is off stays in the edition and does nothing." checked={rule.enabled} disabled={disabled} onCheckedChange={(checked) => onChange({ ...rule, enabled: checked === true })} />
      <Part title="When">
        <ConditionEditor condition={rule.when} path={`${path}.when`} onChange={(when, merge) => onChange({ ...rule, when }, merge)} onRemove={null} />
      </Part>
      <Part title="Then">
        <ProblemsAt path={`${path}.then`} errorsToo />
        {rule.then.map((effect, index) => (
          <EffectEditor
            key={index}
            effect={effect}
            path={`${path}.then.${index}`}
            catalogue={catalogue}
            onChange={(next, merge) => setEffects(rule.then.with(index, next), merge)}
            onRemove={rule.then.length === 1 ? null : () => setEffects(rule.then.toSpliced(index, 1))}
          />
        ))}
        <div>
          <Button size="small" variant="quiet" disabled={rule.then.length >= mostEffects} onClick={() => setEffects([...rule.then, blankEffect])}>
            <Plus aria-hidden /> Effect
          </Button>
        </div>
      </Part>
      <Part title="Because">
        <Field label="Rationale" error={errors.rationale}>
          <Textarea rows={4} value={rule.rationale} maxLength={800} onChange={(event) => onChange({ ...rule, rationale: event.target.value }, `${path}.rationale`)} />
        </Field>
        <SourceEditor source={rule.source} path={`${path}.source`} onChange={(source, merge) => onChange({ ...rule, source }, merge)} />
      </Part>
      <ProblemsAt path={path} errorsToo />
    </fieldset>
  );
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title} className="grid min-w-0 gap-3">
      <h3 className="border-b border-hairline pb-1 text-base font-semibold">{title}</h3>
      {children}
    </section>
  );
}
