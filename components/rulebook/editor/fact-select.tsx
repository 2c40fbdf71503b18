"use client";

import { Select } from "@/components/ui/select";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { strategyNames } from "@/lib/strategies/strategy-names";
import type { FactDefinition, FactGroup } from "@/rules/fact";
import { factDefinitions, findFact } from "@/rules/facts";
import { factPrefixes } from "@/rules/facts/of-strategies";

const groupNames: Record<FactGroup, string> = { answers: "Answers", sizes: "Sizes", estimates: "Estimates", evidence: "Evidence" };

type FactGroupView = { label: string; facts: { name: string; label: string }[] };

/** Facts as the choice lists them: by where they come from, those of a strategy under its name. */
function makeGroups(): FactGroupView[] {
  const strategyOf = (name: string) => strategyIds.find((id) => name.startsWith(factPrefixes[id]) && /^[A-Z]/.test(name.slice(factPrefixes[id].length)));
  const found = new Map<string, FactGroupView>();
  for (const definition of factDefinitions) {
    const strategy = strategyOf(definition.name);
    const label = strategy === undefined ? groupNames[definition.group] : strategyNames[strategy];
    const group = found.get(label) ?? { label, facts: [] };
    found.set(label, group);
    group.facts.push({ name: definition.name, label: factLabel(definition, strategy) });
  }
  return [...found.values()];
}

function factLabel({ label, unit }: FactDefinition, strategy: string | undefined): string {
  const short = strategy === undefined ? label : label.replace(`${strategy}'s `, "");
  return unit === "" ? short : `${short}, ${unit}`;
}

/** Made once: the choice is long, and the same elements are not compared again with each key that is typed. */
const options = makeGroups().map((group) => (
  <optgroup key={group.label} label={group.label}>
    {group.facts.map(({ name, label }) => (
      <option key={name} value={name}>{label}</option>
    ))}
  </optgroup>
));

/** What a condition asks about. A fact that is not known keeps its name, marked. */
export function FactSelect({ fact, onChange, label }: { fact: string; onChange: (fact: string) => void; label: string }) {
  return (
    <Select aria-label={label} value={fact} title={findFact(fact)?.description} onChange={(event) => onChange(event.target.value)}>
      {findFact(fact) === undefined && <option value={fact}>{fact} (unknown)</option>}
      {options}
    </Select>
  );
}
