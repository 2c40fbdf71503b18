import { z } from "zod";
import { findCase } from "@/db/queries/cases";
import { withTeam } from "@/db/scope";
import type { Advice } from "@/lib/advice/advice";
import { evidenceCounts } from "@/lib/advice/evidence";
import { deriveFacts } from "@/lib/advice/facts";
import { computeAdvice } from "@/lib/advice/pipeline";
import { caseRefSchema } from "@/lib/api/contract/common";
import type { TraceView, TrialView } from "@/lib/api/contract/drafts";
import { defineUseCase } from "@/lib/auth/guard";
import { estimateAll } from "@/lib/estimates/estimate-all";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { adviceBasis } from "@/lib/use-cases/advice/team-evidence";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";
import { traceCondition, type ConditionTrace } from "@/rules/trace";
import { truthWords } from "@/rules/truth";
import { readRules } from "./read-rules";
import { refuseErrors } from "./submit-draft";

/** What rules would say about a case today: facts, the truth of every condition, and the ranking beside the live edition's. */
export const tryRules = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ case: caseRefSchema, rules: z.unknown() }),
  run: ({ scope }, { case: reference, rules: given }): Promise<TrialView> => {
    const rules = readRules(given, "rules");
    refuseErrors(rules);
    return withTeam(scope, async (db) => {
      const found = await findCase(db, scope, caseRefOf(reference));
      if (found === null) throw caseNotFound();
      const { answers } = found;
      const basis = await adviceBasis(db, scope);
      const sizes = computeSizes(answers);
      const facts = deriveFacts(answers, sizes, estimateAll(answers, sizes), evidenceCounts(basis.evidence.model));
      const tried = await computeAdvice({ ...basis, answers, ruleSet: rules, caseId: found.id });
      const live = await computeAdvice({ ...basis, answers, caseId: found.id });
      return {
        case: { id: found.id, number: found.number, title: found.title },
        facts: Object.fromEntries(Object.entries(facts).map(([name, value]) => [name, typeof value === "object" ? [...value] : value])),
        rules: rules.map(({ id, enabled, when }) => {
          const trace = traceView(traceCondition(when, facts));
          return { rule: id, enabled, truth: enabled ? trace.truth : "false", trace };
        }),
        ranking: rankingView(tried),
        live: { number: basis.editionNumber, ranking: rankingView(live) },
      };
    });
  },
});

function traceView(trace: ConditionTrace): TraceView {
  const truth = truthWords[trace.truth];
  if (trace.kind !== "comparison") return { kind: trace.kind, members: trace.members.map(traceView), truth };
  const { fact, operator, value } = trace.comparison;
  const factValue = typeof trace.factValue === "object" && trace.factValue !== null ? [...trace.factValue] : trace.factValue;
  return { kind: "comparison", fact, operator, value, factValue, truth };
}

function rankingView({ ranking }: Advice): TrialView["ranking"] {
  return ranking.flatMap(({ status, strategy, relativeTime, factors }) =>
    status === "ranked" ? [{ strategy, relativeTime: relativeTime ?? 1, rules: factors.flatMap((factor) => (factor.rule === null ? [] : [factor.rule])) }] : [],
  );
}
