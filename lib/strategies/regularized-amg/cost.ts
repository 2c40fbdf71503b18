import type { CostKit, StrategyCost } from "../cost";
import { gammaStep } from "../regularisation";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** MINRES: the matrix, one multigrid cycle on A + gamma Bᵀ W^-1 B, a scaled pressure mass matrix, 12 vectors and 2 reductions an iteration. */
export function cost(kit: CostKit, context: StrategyContext): StrategyCost {
  const { answers } = context;
  const { monitoredTolerance, why } = kit.residualLag("regularised");
  const count = kit.iterations.regularised(monitoredTolerance);
  const multigrid = kit.multigridOn("augmented");
  const { unknowns, nonzeros } = kit.system;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 12, reductions: 2 }, { name: "one multigrid cycle", seconds: multigrid.cycleSeconds });
  const notes = [];
  if (answers.contrast.ratio >= 100) notes.push("Plain multigrid on the augmented block degrades with the contrast: seven times the iterations at 1e4 in the reference runs.");
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: null,
    memoryBytes: kit.storageBytes(nonzeros + kit.system.velocityNonzeros, unknowns, 12) + multigrid.memoryBytes,
    setupSeconds: kit.streamSeconds(60 * kit.system.velocityNonzeros) + multigrid.setupSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: null,
    parameters: { gamma: kit.gamma.value, gammaOverH2: kit.gamma.overH2, monitoredTolerance },
    notes,
    why: [gammaStep(context), why, ...count.why, iteration.why, ...multigrid.why],
    accuracy: "regularised",
  };
}
