import { residualNotes } from "../residual-notes";
import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** MINRES: the matrix, diag(A), one multigrid cycle on the Schur complement, 12 vectors and 2 reductions an iteration. */
export function cost(kit: CostKit, context: StrategyContext): StrategyCost {
  const { lag, monitoredTolerance, why } = kit.residualLag("block-diagonal");
  const count = kit.iterations.blockDiagonal("multigrid", monitoredTolerance);
  const multigrid = kit.multigridOn("schur");
  const { unknowns, nonzeros } = kit.system;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 12, reductions: 2 }, { name: "one multigrid cycle", seconds: multigrid.cycleSeconds });
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: kit.spectralInterval(),
    memoryBytes: kit.storageBytes(nonzeros, unknowns, 12) + multigrid.memoryBytes,
    setupSeconds: kit.streamSeconds(48 * (kit.system.velocityNonzeros + kit.system.schurNonzeros)) + multigrid.setupSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: null,
    parameters: { monitoredTolerance },
    notes: residualNotes(context.answers, lag),
    why: [why, ...count.why, iteration.why, ...multigrid.why],
    accuracy: "block-diagonal",
  };
}
