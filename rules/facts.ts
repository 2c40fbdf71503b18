import { strategyIds } from "@/lib/shared/strategy-ids";
import { numberFact, stringFact, type FactDefinition, type Facts, type FactValue } from "./fact";
import { answerFacts } from "./facts/of-answers";
import { sizeFacts } from "./facts/of-sizes";
import { strategyFacts } from "./facts/of-strategies";

const comparisonFacts: readonly FactDefinition[] = [
  stringFact({
    name: "fastestStrategy",
    label: "fastest strategy by the model",
    group: "estimates",
    allowed: strategyIds,
    description: "Smallest predicted total time of all eleven, whether or not the program supplies what it needs.",
  }),
  numberFact({
    name: "directToFastestRatio",
    label: "predicted time of direct-ldlt over the fastest",
    group: "estimates",
    range: [1, 1e300],
    description: "Predicted total time of direct-ldlt over the smallest of all eleven.",
  }),
  numberFact({
    name: "evidenceRuns",
    label: "recorded runs of the team",
    plural: true,
    group: "evidence",
    range: [0, 1e9],
    whole: true,
    description: "All runs in the record that speak in evidence factors.",
  }),
];

/** Every fact a condition may ask about, in the order in which an editor lists them. Names are unique. */
export const factDefinitions: readonly FactDefinition[] = [...answerFacts, ...sizeFacts, ...comparisonFacts, ...strategyFacts];

const byName: ReadonlyMap<string, FactDefinition> = new Map(factDefinitions.map((fact) => [fact.name, fact]));

/** The definition of a fact, or undefined where there is none of that name. */
export function findFact(name: string): FactDefinition | undefined {
  return byName.get(name);
}

/**
 * Check facts before they meet rules: every fact of the registry present, of its type, numbers finite, words of the closed set.
 * Returns the same object. Throws RangeError naming the first fact that fails, for the pipeline alone is to blame for it.
 */
export function parseFacts(facts: Facts): Facts {
  for (const definition of factDefinitions) {
    const value = facts[definition.name];
    if (value === undefined) throw new RangeError(`The fact ${definition.name} is missing.`);
    if (!isValueOf(definition, value)) throw new RangeError(`The fact ${definition.name} can't be ${JSON.stringify(value)}.`);
  }
  return facts;
}

function isValueOf({ type, allowed }: FactDefinition, value: FactValue): boolean {
  switch (type) {
    case "number":
      return typeof value === "number" && Number.isFinite(value);
    case "boolean":
      return typeof value === "boolean";
    case "string":
      return typeof value === "string" && (allowed === null || allowed.includes(value));
    case "list":
      return Array.isArray(value) && value.every((member) => typeof member === "string" && (allowed === null || allowed.includes(member)));
  }
}
