import { residualNotes } from "../residual-notes";
import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** MINRES with diag(A) and a two-level Schwarz method on the Schur complement: one substitution a subdomain and one on the coarse level an iteration. */
export function cost(kit: CostKit, { answers }: StrategyContext): StrategyCost {
  const { lag, monitoredTolerance, why } = kit.residualLag("block-diagonal");
  const count = kit.iterations.schwarz(monitoredTolerance);
  const factor = kit.subdomains("schwarz");
  const { unknowns, nonzeros } = kit.system;
  const traffic = { nonzeros, unknowns, vectors: 12, reductions: 2 };
  const iteration = iterationCost(kit, traffic, { name: "one substitution a subdomain and one on the coarse level", seconds: factor.solveSeconds });
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: kit.spectralInterval(),
    memoryBytes: kit.storageBytes(nonzeros, unknowns, 12) + factor.memoryBytes,
    setupSeconds: kit.streamSeconds(48 * (kit.system.velocityNonzeros + kit.system.schurNonzeros)) + factor.analysisSeconds + factor.factorSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: { entries: factor.entries, flops: factor.flops },
    parameters: { monitoredTolerance },
    notes: residualNotes(answers, lag),
    why: [why, ...count.why, iteration.why, ...factor.why],
    accuracy: "theory",
  };
}
