import { residualNotes } from "../residual-notes";
import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** MINRES: the matrix, one auxiliary-space cycle on A + Bᵀ W^-1 B, the pressure mass matrix, 12 vectors and 2 reductions an iteration. */
export function cost(kit: CostKit, { answers }: StrategyContext): StrategyCost {
  const { lag, monitoredTolerance, why } = kit.residualLag("auxiliary");
  const count = kit.iterations.auxiliarySpace(monitoredTolerance);
  const multigrid = kit.multigridOn("auxiliary");
  const { unknowns, nonzeros } = kit.system;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 12, reductions: 2 }, { name: "one auxiliary-space cycle", seconds: multigrid.cycleSeconds });
  const notes = residualNotes(answers, lag);
  if (answers.degree > 1) notes.push("Above lowest order the program must supply the interpolations; the count is extrapolated.");
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: null,
    memoryBytes: kit.storageBytes(nonzeros + kit.system.velocityNonzeros, unknowns, 12) + 2 * multigrid.memoryBytes,
    setupSeconds: kit.streamSeconds(60 * kit.system.velocityNonzeros) + multigrid.setupSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: null,
    parameters: { monitoredTolerance },
    notes,
    why: [why, ...count.why, iteration.why, ...multigrid.why],
    accuracy: "auxiliary",
  };
}
