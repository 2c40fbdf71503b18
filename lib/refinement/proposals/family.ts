import type { Rule } from "@/rules/rule-schema";
import type { ProposalChange, ProposalKind } from "../proposal-schema";
import type { Walk } from "./walk";

/** Candidates that are one idea: all values of one threshold, all factors of one effect, all bounds of one region. */
export type Family = {
  /** Stable name: kind, rule and place. */
  key: string;
  kind: ProposalKind;
  walks: readonly Walk[];
  /** The change itself, for the candidate called `tag` that ends after `count` positions of walk `walk`. */
  changeOf: (candidate: Candidate) => FamilyChange;
};

export type Candidate = { walk: number; count: number; tag: number };

export type FamilyChange = {
  change: ProposalChange;
  formerRule: Rule | null;
  /** Source and rationale of what the record says are filled in by the search. */
  rule: Rule;
  words: string;
};
