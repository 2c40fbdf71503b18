"use client";

import { Trash2 } from "lucide-react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { strategyIds, type StrategyId } from "@/lib/shared/strategy-ids";
import { strategyNames } from "@/lib/strategies/strategy-names";
import type { Effect } from "@/rules/rule-schema";
import { effectKinds, effectLabels, rangeOf, settingOf, withKind } from "./effect-changes";
import { NumberBox } from "./number-box";
import { ProblemsAt, useErrorAt, type ParameterCatalogue } from "./rule-problems";

type Change = (effect: Effect, merge?: string) => void;
type EffectEditorProps = { effect: Effect; path: string; catalogue: ParameterCatalogue; onChange: Change; /** Null where the effect must stay. */ onRemove: (() => void) | null };

/** One thing that a rule does, read as a sentence: kind, strategy, and what belongs to the kind. */
export function EffectEditor({ effect, path, catalogue, onChange, onRemove }: EffectEditorProps) {
  return (
    <div className="grid gap-2 border-l-2 border-contour pl-3 sm:pl-4">
      <div className="flex items-start gap-2">
        <div className="grid min-w-0 grow gap-2 sm:grid-cols-2 xl:grid-cols-[11rem_minmax(0,1fr)]">
          <Select
            aria-label="What the rule does"
            value={effect.kind}
            onChange={(event) => {
              const kind = effectKinds.find((known) => known === event.target.value);
              if (kind !== undefined) onChange(withKind(effect, kind, catalogue));
            }}
          >
            {effectKinds.map((kind) => (
              <option key={kind} value={kind}>{effectLabels[kind]}</option>
            ))}
          </Select>
          <StrategySelect label="Strategy" strategy={effect.strategy} optional={effect.kind === "caution"} onChange={(strategy) => onChange(withStrategy(effect, strategy, catalogue))} />
        </div>
        {onRemove !== null && (
          <Button size="icon" variant="quiet" aria-label="Remove this effect" title="Remove this effect" onClick={onRemove}>
            <Trash2 aria-hidden />
          </Button>
        )}
      </div>
      <EffectDetail effect={effect} path={path} catalogue={catalogue} onChange={onChange} />
      <ProblemsAt path={path} errorsToo />
    </div>
  );
}

function withStrategy(effect: Effect, strategy: StrategyId | null, catalogue: ParameterCatalogue): Effect {
  if (effect.kind === "caution") return { ...effect, strategy };
  if (strategy === null) return effect;
  if (effect.kind === "set" && rangeOf(strategy, effect.parameter, catalogue) === null) return settingOf(strategy, Object.keys(catalogue[strategy])[0] ?? "", catalogue);
  return { ...effect, strategy };
}

function EffectDetail({ effect, path, catalogue, onChange }: Omit<EffectEditorProps, "onRemove">) {
  const errors = { factor: useErrorAt(`${path}.factor`), reason: useErrorAt(`${path}.reason`), text: useErrorAt(`${path}.text`), when: useErrorAt(`${path}.when`), to: useErrorAt(`${path}.to`) };
  switch (effect.kind) {
    case "favour":
    case "disfavour":
      return (
        <Field label="Factor in time" error={errors.factor} help={effect.kind === "favour" ? "2 halves the predicted time; 1 gives the reason for what the model already counts." : "2 doubles the predicted time; 1 gives the reason for what the model already counts."} className="max-w-sm">
          <NumberBox value={effect.factor} onNumber={(factor) => onChange({ ...effect, factor }, `${path}.factor`)} unit="x" />
        </Field>
      );
    case "exclude":
      return <Words label="Reason" error={errors.reason} value={effect.reason} onChange={(reason) => onChange({ ...effect, reason }, `${path}.reason`)} />;
    case "caution":
      return <Words label="What to mind" error={errors.text} value={effect.text} onChange={(text) => onChange({ ...effect, text }, `${path}.text`)} />;
    case "fallback":
      return (
        <div className="grid gap-2 sm:grid-cols-2">
          <Field label="Fall back on" error={errors.to}>
            <StrategySelect strategy={effect.to} optional={false} onChange={(to) => to !== null && onChange({ ...effect, to })} />
          </Field>
          <Words label="When" error={errors.when} value={effect.when} onChange={(when) => onChange({ ...effect, when }, `${path}.when`)} />
        </div>
      );
    case "set":
      return <SettingDetail effect={effect} path={path} catalogue={catalogue} onChange={onChange} />;
  }
}

function Words({ label, error, value, onChange }: { label: string; error: string | undefined; value: string; onChange: (text: string) => void }) {
  return (
    <Field label={label} error={error}>
      <Input value={value} maxLength={400} onChange={(event) => onChange(event.target.value)} />
    </Field>
  );
}

type SettingProps = { effect: Extract<Effect, { kind: "set" }>; path: string; catalogue: ParameterCatalogue; onChange: Change };

function SettingDetail({ effect, path, catalogue, onChange }: SettingProps) {
  const range = rangeOf(effect.strategy, effect.parameter, catalogue);
  const names = Object.keys(catalogue[effect.strategy]);
  const bounds = range !== null && typeof range[0] === "number" && typeof range[1] === "number" ? `from ${range[0]} to ${range[1]}` : undefined;
  const setValue = (value: number | string) => onChange({ ...effect, value }, `${path}.value`);
  return (
    <div className="grid gap-2 sm:grid-cols-2">
      <Field label="Parameter" error={useErrorAt(`${path}.parameter`)}>
        <Select value={effect.parameter} onChange={(event) => onChange(settingOf(effect.strategy, event.target.value, catalogue))}>
          {range === null && <option value={effect.parameter}>{effect.parameter === "" ? "none" : `${effect.parameter} (unknown)`}</option>}
          {names.map((name) => (
            <option key={name} value={name}>{name}</option>
          ))}
        </Select>
      </Field>
      <Field label="Value" hint={bounds} error={useErrorAt(`${path}.value`)}>
        {range !== null && bounds === undefined ? (
          <Select value={String(effect.value)} onChange={(event) => setValue(event.target.value)}>
            {!range.some((word) => word === effect.value) && <option value={String(effect.value)}>{effect.value} (does not fit)</option>}
            {range.map((word) => (
              <option key={word} value={word}>{word}</option>
            ))}
          </Select>
        ) : typeof effect.value === "number" ? (
          <NumberBox value={effect.value} onNumber={setValue} />
        ) : (
          <Input value={effect.value} onChange={(event) => setValue(event.target.value)} />
        )}
      </Field>
    </div>
  );
}

/** In a field, the field's label names it; elsewhere `label` does. */
function StrategySelect({ strategy, optional, onChange, label }: { strategy: StrategyId | null; optional: boolean; onChange: (strategy: StrategyId | null) => void; label?: string }) {
  return (
    <Select aria-label={label} value={strategy ?? ""} onChange={(event) => onChange(strategyIds.find((id) => id === event.target.value) ?? null)}>
      {optional && <option value="">every strategy</option>}
      {strategyIds.map((id) => (
        <option key={id} value={id}>{strategyNames[id]}</option>
      ))}
    </Select>
  );
}
