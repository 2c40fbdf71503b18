"use client";

import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { findFact } from "@/rules/facts";
import { operatorsOf } from "@/rules/fit-comparison";
import { comparisonOperators, type Comparison, type ComparisonOperator } from "@/rules/rule-schema";
import { withFact, withOperator } from "./condition-groups";
import { FactSelect } from "./fact-select";
import { NumberBox, numberOf } from "./number-box";
import { useErrorAt } from "./rule-problems";

export const operatorLabels: Record<ComparisonOperator, string> = {
  equal: "is",
  notEqual: "is not",
  lessThan: "is less than",
  lessThanInclusive: "is at most",
  greaterThan: "is more than",
  greaterThanInclusive: "is at least",
  in: "is one of",
  notIn: "is none of",
  contains: "includes",
  doesNotContain: "does not include",
};

type ComparisonEditorProps = { comparison: Comparison; path: string; onChange: (comparison: Comparison, merge?: string) => void };

/** One comparison: a fact, an operator that fits it, a value in its unit. */
export function ComparisonEditor({ comparison, path, onChange }: ComparisonEditorProps) {
  const definition = findFact(comparison.fact);
  const operators = definition === undefined ? comparisonOperators : operatorsOf[definition.type];
  const fits = operators.includes(comparison.operator);
  const setOperator = (word: string) => {
    const operator = comparisonOperators.find((known) => known === word);
    if (operator !== undefined) onChange(withOperator(comparison, operator));
  };
  return (
    <div className="grid min-w-0 gap-2 sm:grid-cols-[minmax(0,1.4fr)_minmax(0,0.9fr)_minmax(0,1fr)]">
      <Field label={<span className="sr-only">Fact</span>} error={useErrorAt(`${path}.fact`)}>
        <FactSelect label="Fact" fact={comparison.fact} onChange={(fact) => onChange(withFact(comparison, fact))} />
      </Field>
      <Field label={<span className="sr-only">Comparison</span>} error={useErrorAt(`${path}.operator`)}>
        <Select aria-label="Comparison" value={comparison.operator} onChange={(event) => setOperator(event.target.value)}>
          {!fits && <option value={comparison.operator}>{operatorLabels[comparison.operator]} (does not fit)</option>}
          {operators.map((operator) => (
            <option key={operator} value={operator}>{operatorLabels[operator]}</option>
          ))}
        </Select>
      </Field>
      <Field label={<span className="sr-only">Value</span>} error={useErrorAt(`${path}.value`)}>
        <ValueEditor comparison={comparison} onChange={(value) => onChange({ ...comparison, value }, `${path}.value`)} />
      </Field>
    </div>
  );
}

type ValueEditorProps = { comparison: Comparison; onChange: (value: Comparison["value"]) => void };

function ValueEditor({ comparison: { fact, operator, value }, onChange }: ValueEditorProps) {
  const definition = findFact(fact);
  const unit = definition === undefined || definition.unit === "" ? {} : { unit: definition.unit };
  const list = operator === "in" || operator === "notIn";
  if (list) return <ListEditor allowed={definition?.allowed ?? null} numeric={definition?.type === "number"} values={Array.isArray(value) ? value : [String(value)]} onChange={onChange} />;
  if (definition?.type === "number" && typeof value === "number") return <NumberBox aria-label="Value" value={value} onNumber={onChange} {...unit} />;
  if (definition?.type === "boolean") {
    return (
      <Select aria-label="Value" value={String(value)} onChange={(event) => onChange(event.target.value === "true")}>
        <option value="true">yes</option>
        <option value="false">no</option>
      </Select>
    );
  }
  const allowed = definition?.allowed ?? null;
  if (allowed !== null) {
    return (
      <Select aria-label="Value" value={String(value)} onChange={(event) => onChange(event.target.value)}>
        {!allowed.includes(String(value)) && <option value={String(value)}>{String(value)} (does not fit)</option>}
        {allowed.map((word) => (
          <option key={word} value={word}>{word}</option>
        ))}
      </Select>
    );
  }
  // A value that does not fit its fact, such as a word where a number belongs: to be mended.
  return <Input aria-label="Value" value={Array.isArray(value) ? value.join(", ") : String(value)} onChange={(event) => onChange(definition?.type === "number" ? (numberOf(event.target.value) ?? event.target.value) : event.target.value)} {...unit} />;
}

type ListEditorProps = { allowed: readonly string[] | null; numeric: boolean; values: readonly (number | string)[]; onChange: (value: (number | string)[]) => void };

function ListEditor({ allowed, numeric, values, onChange }: ListEditorProps) {
  if (allowed === null) {
    const read = (text: string) => text.split(/[;,]/).map((part) => part.trim()).filter((part) => part !== "").map((part) => (numeric ? (numberOf(part) ?? part) : part));
    return <Input aria-label="Values, separated by commas" key={values.join()} defaultValue={values.join(", ")} onBlur={(event) => onChange(read(event.target.value))} />;
  }
  const strangers = values.filter((value) => !allowed.includes(String(value)));
  return (
    <fieldset className="grid gap-1 border border-hairline px-3 py-2">
      <legend className="sr-only">Values</legend>
      {[...allowed, ...strangers].map((word) => (
        <label key={word} className="flex items-center gap-2 text-sm">
          <input
            type="checkbox"
            className="size-4 accent-[var(--ink)]"
            checked={values.includes(word)}
            onChange={(event) => onChange(event.target.checked ? [...values, word] : values.filter((value) => value !== word))}
          />
          {word}
        </label>
      ))}
    </fieldset>
  );
}
