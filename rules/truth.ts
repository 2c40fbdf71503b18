/** Three-valued logic of Kleene as small integers, so that all = min, any = max, not = 2 - x. */
export const falseTruth = 0;
export const unknownTruth = 1;
export const trueTruth = 2;
export type Truth = typeof falseTruth | typeof unknownTruth | typeof trueTruth;

export const truthWords: Record<Truth, "false" | "unknown" | "true"> = { 0: "false", 1: "unknown", 2: "true" };

/** Kleene's negation: unknown stays unknown. */
export function negate(truth: Truth): Truth {
  return truth === unknownTruth ? unknownTruth : truth === trueTruth ? falseTruth : trueTruth;
}

export function truthOf(holds: boolean): Truth {
  return holds ? trueTruth : falseTruth;
}
