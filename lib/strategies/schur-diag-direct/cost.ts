import { residualNotes } from "../residual-notes";
import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** MINRES: the matrix, diag(A), one substitution with the factorised Schur complement, 12 vectors and 2 reductions an iteration. */
export function cost(kit: CostKit, context: StrategyContext): StrategyCost {
  const { lag, monitoredTolerance, why } = kit.residualLag("block-diagonal");
  const count = kit.iterations.blockDiagonal("exact", monitoredTolerance);
  const factor = kit.factoriseSchur();
  const { unknowns, nonzeros } = kit.system;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 12, reductions: 2 }, { name: "one substitution", seconds: factor.solveSeconds });
  return {
    iterations: count.expected,
    iterationBound: count.bound,
    interval: kit.spectralInterval(),
    memoryBytes: kit.storageBytes(nonzeros, unknowns, 12) + factor.memoryBytes,
    setupSeconds: kit.streamSeconds(48 * (kit.system.velocityNonzeros + kit.system.schurNonzeros)) + factor.analysisSeconds + factor.factorSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: { entries: factor.entries, flops: factor.flops },
    parameters: { monitoredTolerance },
    notes: residualNotes(context.answers, lag),
    why: [why, ...count.why, iteration.why, ...factor.why],
    accuracy: "block-diagonal",
  };
}
