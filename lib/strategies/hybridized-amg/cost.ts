import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";

/**
 * CG on the face multipliers with one multigrid cycle. Condensing inverts a dense matrix in every cell, once; a solve condenses the right-hand side and recovers
 * velocity and pressure: two passes over the cell matrices.
 */
export function cost(kit: CostKit): StrategyCost {
  const { monitoredTolerance, why } = kit.residualLag("condensed");
  const count = kit.iterations.hybridised(monitoredTolerance);
  const multigrid = kit.multigridOn("multipliers");
  const { unknowns, nonzeros } = kit.multipliers;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 8, reductions: 2 }, { name: "one multigrid cycle", seconds: multigrid.cycleSeconds });
  const recovery = 2 * kit.streamSeconds(8 * kit.system.nonzeros);
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: null,
    memoryBytes: kit.storageBytes(nonzeros, unknowns, 8) + 8 * kit.system.nonzeros + multigrid.memoryBytes,
    setupSeconds: kit.streamSeconds(120 * kit.system.nonzeros) + multigrid.setupSeconds,
    solveSeconds: count.expected * iteration.seconds + recovery,
    factor: null,
    parameters: { monitoredTolerance },
    notes: [],
    why: [why, ...count.why, iteration.why, ...multigrid.why],
    accuracy: "hybridised",
  };
}
