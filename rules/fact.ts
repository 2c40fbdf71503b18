/** What a fact can hold. Lists are of strings, such as the capabilities a program has. */
export const factTypes = ["number", "string", "boolean", "list"] as const;
export type FactType = (typeof factTypes)[number];

/** Where a fact comes from, in the order of the pipeline. */
export const factGroups = ["answers", "sizes", "estimates", "evidence"] as const;
export type FactGroup = (typeof factGroups)[number];

export type FactValue = number | string | boolean | readonly (number | string)[];
/** Facts of one case by name. Complete for advice; a name that is absent is "unknown" to the compiled evaluator. */
export type Facts = Readonly<Record<string, FactValue>>;

/** One thing a rule's condition may ask about. `unit` is "" for pure numbers, counts and words. */
export type FactDefinition = {
  name: string;
  /** The trade's words, so that "<label> is at most 2" reads as a sentence. */
  label: string;
  plural: boolean;
  unit: string;
  type: FactType;
  group: FactGroup;
  /** Closed set of a string, or of a list's members; null for numbers and booleans. */
  allowed: readonly string[] | null;
  /** Smallest and largest number possible; null for other types. */
  range: readonly [number, number] | null;
  whole: boolean;
  description: string;
};

type Described = Pick<FactDefinition, "name" | "label" | "group" | "description"> & { plural?: boolean };

/** A number with its unit and its possible range. */
export function numberFact(
  fact: Described & { unit?: string; range: readonly [number, number]; whole?: boolean },
): FactDefinition {
  return { plural: false, unit: "", whole: false, ...fact, type: "number", allowed: null };
}

/** One word out of a closed set. */
export function stringFact(fact: Described & { allowed: readonly string[] }): FactDefinition {
  return { plural: false, ...fact, unit: "", type: "string", range: null, whole: false };
}

/** Yes or no. */
export function booleanFact(fact: Described): FactDefinition {
  return { plural: false, ...fact, unit: "", type: "boolean", allowed: null, range: null, whole: false };
}

/** Several words out of a closed set. */
export function listFact(fact: Described & { allowed: readonly string[] }): FactDefinition {
  return { plural: false, ...fact, unit: "", type: "list", range: null, whole: false };
}
