import type { CostKit, StrategyCost } from "../cost";
import { gammaStep } from "../regularisation";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** FGMRES with a p-multigrid cycle on the augmented block: patch smoothers move about the nonzeros of the block twice as often as point ones. */
export function cost(kit: CostKit, context: StrategyContext): StrategyCost {
  const count = kit.iterations.pMultigrid(context.answers.tolerance);
  const multigrid = kit.multigridOn("augmented");
  const { unknowns, nonzeros } = kit.system;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 40, reductions: 2 }, { name: "one p-multigrid cycle", seconds: 2 * multigrid.cycleSeconds });
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: null,
    memoryBytes: kit.storageBytes(nonzeros + 2 * kit.system.velocityNonzeros, unknowns, 70) + 2 * multigrid.memoryBytes,
    setupSeconds: kit.streamSeconds(60 * kit.system.velocityNonzeros) + 2 * multigrid.setupSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: null,
    parameters: { gamma: kit.gamma.value, gammaOverH2: kit.gamma.overH2 },
    notes: [],
    why: [gammaStep(context), ...count.why, iteration.why, ...multigrid.why],
    accuracy: "theory",
  };
}
