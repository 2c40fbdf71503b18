"use client";

import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import type { RuleSource } from "@/rules/rule-schema";
import { useErrorAt } from "./rule-problems";

const kinds: Record<RuleSource["kind"], { label: string; empty: (words: string) => RuleSource }> = {
  "common-practice": { label: "common practice, no source", empty: () => ({ kind: "common-practice" }) },
  published: { label: "published", empty: (citation) => ({ kind: "published", citation }) },
  "team-evidence": { label: "the team's own runs", empty: (numbers) => ({ kind: "team-evidence", numbers }) },
};

type SourceEditorProps = { source: RuleSource; path: string; onChange: (source: RuleSource, merge?: string) => void };

/** Where a rule comes from. */
export function SourceEditor({ source, path, onChange }: SourceEditorProps) {
  const words = source.kind === "published" ? source.citation : source.kind === "team-evidence" ? source.numbers : "";
  const errors = { citation: useErrorAt(`${path}.citation`), numbers: useErrorAt(`${path}.numbers`) };
  return (
    <div className="grid gap-3 sm:grid-cols-[14rem_minmax(0,1fr)]">
      <Field label="Source">
        <Select
          value={source.kind}
          onChange={(event) => {
            const entry = Object.entries(kinds).find(([kind]) => kind === event.target.value);
            if (entry !== undefined) onChange(entry[1].empty(words));
          }}
        >
          {Object.entries(kinds).map(([kind, { label }]) => (
            <option key={kind} value={kind}>{label}</option>
          ))}
        </Select>
      </Field>
      {source.kind === "published" && (
        <Field label="Citation" error={errors.citation}>
          <Input value={source.citation} maxLength={400} onChange={(event) => onChange({ ...source, citation: event.target.value }, `${path}.citation`)} />
        </Field>
      )}
      {source.kind === "team-evidence" && (
        <Field label="Numbers" error={errors.numbers}>
          <Input value={source.numbers} maxLength={400} onChange={(event) => onChange({ ...source, numbers: event.target.value }, `${path}.numbers`)} />
        </Field>
      )}
    </div>
  );
}
