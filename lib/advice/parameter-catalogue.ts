import { strategies } from "@/lib/strategies/index";
import type { ParameterCatalogue } from "@/rules/validate-rule-set";
import { byStrategy } from "./evidence";

/** The parameters that a rule's `set` may name, out of the strategies' definitions. */
export const parameterCatalogue: ParameterCatalogue = byStrategy((strategy) =>
  Object.fromEntries(strategies[strategy].parameters.map(({ name, range }) => [name, range])),
);
