"use client";

import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { discretisationLabels, meshFamilyLabels } from "@/lib/questionnaire/answer-labels";
import { discretisations, meshFamilies } from "@/lib/questionnaire/answer-sets";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { strategyNames } from "@/lib/strategies/strategy-names";

type RateFiltersProps = { filter: Readonly<Record<string, string>>; onChange: (changes: Record<string, string>) => void; onClear: () => void };

const choices = [
  { name: "discretisation", label: "Discretisation", options: discretisations.map((value) => ({ value: String(value), label: discretisationLabels[value] })) },
  { name: "meshFamily", label: "Mesh family", options: meshFamilies.map((value) => ({ value: String(value), label: meshFamilyLabels[value] })) },
  { name: "degree", label: "Degree", options: ["1", "2", "3", "4", "5", "6"].map((value) => ({ value, label: value })) },
  { name: "advised", label: "Advised first", options: strategyIds.map((value) => ({ value: String(value), label: strategyNames[value] })) },
] as const;

/** Filters of the hit rates; each change goes to the address. */
export function RateFilters({ filter, onChange, onClear }: RateFiltersProps) {
  return (
    <form aria-label="Filter the hit rates" data-screen-only className="grid grid-cols-1 items-end gap-x-4 gap-y-3 sm:grid-cols-2 xl:grid-cols-4" onSubmit={(event) => event.preventDefault()}>
      {choices.map((choice) => (
        <Field key={choice.name} label={choice.label}>
          <Select value={filter[choice.name] ?? ""} onChange={(event) => onChange({ [choice.name]: event.target.value })}>
            <option value="">Any</option>
            {choice.options.map((option) => (
              <option key={option.value} value={option.value}>{option.label}</option>
            ))}
          </Select>
        </Field>
      ))}
      <Field label="Measured from">
        <Input type="date" value={filter.from ?? ""} max={filter.to} onChange={(event) => onChange({ from: event.target.value })} />
      </Field>
      <Field label="Measured to">
        <Input type="date" value={filter.to ?? ""} min={filter.from} onChange={(event) => onChange({ to: event.target.value })} />
      </Field>
      <Button variant="quiet" className="justify-self-start" onClick={onClear}>Clear the filters</Button>
    </form>
  );
}
