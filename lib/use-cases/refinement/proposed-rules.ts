import type { TeamDatabase } from "@/db/scope";
import type { Scope } from "@/lib/auth/guard";
import { applyProposal } from "@/lib/refinement/apply-proposal";
import type { Proposal } from "@/lib/refinement/proposal-schema";
import { AppError } from "@/lib/shared/app-error";
import type { RuleSet } from "@/rules/rule-schema";
import { readSearch } from "./work-views";

/** The live rules with a proposal carried out. Throws AppError "conflict" when the rule it changes is no longer what it was made for. */
export async function proposedRules(db: TeamDatabase, scope: Scope, { search, key, live }: { search: string; key: string; live: RuleSet }): Promise<{ proposal: Proposal; rules: RuleSet }> {
  const { result } = await readSearch(db, scope, search);
  const proposal = result?.proposals.find((one) => one.key === key);
  if (proposal === undefined) throw new AppError("invalid", "This search proposes no such change.", { fields: [{ path: "key", message: "There is no such proposal." }] });
  try {
    return { proposal, rules: applyProposal(live, proposal) };
  } catch (error) {
    if (error instanceof RangeError) throw new AppError("conflict", `${error.message} Search again under the live edition.`);
    throw error;
  }
}
