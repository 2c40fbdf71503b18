import type { RuleSet } from "@/rules/rule-schema";
import { augmentedRules } from "./first/augmented-rules";
import { blockRules } from "./first/block-rules";
import { decompositionRules } from "./first/decomposition-rules";
import { directRules } from "./first/direct-rules";

/**
 * The rulebook that a new team starts from. A factor of 1 gives the reason for what the model already holds; other factors name the
 * effect that the model leaves out.
 */
export const firstEdition: RuleSet = [...blockRules, ...directRules, ...augmentedRules, ...decompositionRules];
