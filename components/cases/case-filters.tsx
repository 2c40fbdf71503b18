"use client";

import { useEffect, useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { discretisationLabels, meshFamilyLabels } from "@/lib/questionnaire/answer-labels";
import { discretisations, meshFamilies } from "@/lib/questionnaire/answer-sets";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { strategyNames } from "@/lib/strategies/strategy-names";
import { statusLooks } from "./case-table";

type Filter = Readonly<Record<string, string>>;
type CaseFiltersProps = { filter: Filter; authors: readonly { id: string; name: string }[]; onChange: (changes: Record<string, string>) => void; onClear: () => void };

/** Search and filters of the case list; each change goes to the address. */
export function CaseFilters({ filter, authors, onChange, onClear }: CaseFiltersProps) {
  return (
    <form role="search" aria-label="Filter the cases" className="grid grid-cols-1 items-end gap-x-4 gap-y-3 sm:grid-cols-2 xl:grid-cols-4" onSubmit={(event) => event.preventDefault()}>
      <Search key={filter.q ?? ""} initial={filter.q ?? ""} onSearch={(q) => onChange({ q })} />
      <Choice label="Status" name="status" filter={filter} onChange={onChange} options={Object.entries(statusLooks).map(([value, { word }]) => ({ value, label: word }))} />
      <Choice label="Advised first" name="strategy" filter={filter} onChange={onChange} options={strategyIds.map((value) => ({ value, label: strategyNames[value] }))} />
      <Choice label="Author" name="author" filter={filter} onChange={onChange} options={authors.map(({ id, name }) => ({ value: id, label: name }))} />
      <Choice label="Discretisation" name="discretisation" filter={filter} onChange={onChange} options={discretisations.map((value) => ({ value, label: discretisationLabels[value] }))} />
      <Choice label="Mesh family" name="meshFamily" filter={filter} onChange={onChange} options={meshFamilies.map((value) => ({ value, label: meshFamilyLabels[value] }))} />
      <Choice label="Degree" name="degree" filter={filter} onChange={onChange} options={["1", "2", "3", "4", "5", "6"].map((value) => ({ value, label: value }))} />
      <Button variant="quiet" className="justify-self-start" onClick={onClear}>Clear the filters</Button>
    </form>
  );
}

function Search({ initial, onSearch }: { initial: string; onSearch: (text: string) => void }) {
  const [text, setText] = useState(initial);
  useEffect(() => {
    if (text === initial) return;
    const timer = setTimeout(() => onSearch(text), 350);
    return () => clearTimeout(timer);
  }, [text, initial, onSearch]);
  return (
    <Field label="Search">
      <Input type="search" value={text} maxLength={120} placeholder="Title or number" onChange={(event) => setText(event.target.value)} />
    </Field>
  );
}

type ChoiceProps = { label: string; name: string; filter: Filter; options: readonly { value: string; label: string }[]; onChange: (changes: Record<string, string>) => void };

function Choice({ label, name, filter, options, onChange }: ChoiceProps) {
  return (
    <Field label={label}>
      <Select value={filter[name] ?? ""} onChange={(event) => onChange({ [name]: event.target.value })}>
        <option value="">Any</option>
        {options.map((option) => (
          <option key={option.value} value={option.value}>{option.label}</option>
        ))}
      </Select>
    </Field>
  );
}
