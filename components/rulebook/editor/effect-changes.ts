import type { Effect } from "@/rules/rule-schema";
import type { ParameterCatalogue } from "@/rules/validate-rule-set";

export const effectKinds = ["favour", "disfavour", "exclude", "set", "caution", "fallback"] as const;
export type EffectKind = (typeof effectKinds)[number];

export const effectLabels: Record<EffectKind, string> = {
  favour: "favour",
  disfavour: "disfavour",
  exclude: "exclude",
  set: "set a parameter of",
  caution: "caution about",
  fallback: "give a fall-back for",
};

export type ParameterRange = readonly [number, number] | readonly string[];

export const blankEffect: Effect = { kind: "favour", strategy: "direct-ldlt", factor: 1.2 };

/** The effect as one of another kind on the same strategy; words are carried over where there are any. */
export function withKind(effect: Effect, kind: EffectKind, catalogue: ParameterCatalogue): Effect {
  if (effect.kind === kind) return effect;
  const strategy = effect.strategy ?? "direct-ldlt";
  const words = wordsOf(effect);
  switch (kind) {
    case "favour":
    case "disfavour":
      return { kind, strategy, factor: "factor" in effect ? effect.factor : 1.2 };
    case "exclude":
      return { kind, strategy, reason: words };
    case "set":
      return settingOf(strategy, Object.keys(catalogue[strategy])[0] ?? "", catalogue);
    case "caution":
      return { kind, strategy, text: words };
    case "fallback":
      return { kind, strategy, to: strategy === "direct-ldlt" ? "schur-triangular" : "direct-ldlt", when: words };
  }
}

/** A setting with the first value that its parameter allows. */
export function settingOf(strategy: NonNullable<Effect["strategy"]>, parameter: string, catalogue: ParameterCatalogue): Effect {
  return { kind: "set", strategy, parameter, value: rangeOf(strategy, parameter, catalogue)?.[0] ?? 0 };
}

export function rangeOf(strategy: NonNullable<Effect["strategy"]>, parameter: string, catalogue: ParameterCatalogue): ParameterRange | null {
  const known = catalogue[strategy];
  return Object.hasOwn(known, parameter) ? (known[parameter] ?? null) : null;
}

function wordsOf(effect: Effect): string {
  if (effect.kind === "exclude") return effect.reason;
  if (effect.kind === "caution") return effect.text;
  return effect.kind === "fallback" ? effect.when : "";
}
