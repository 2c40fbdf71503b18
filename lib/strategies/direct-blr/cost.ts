import type { StrategyContext } from "../strategy";
import type { CostKit, StrategyCost } from "../cost";

/**
 * A compressed factorisation is exact to its drop tolerance; a step of refinement for about every eight digits between that and the
 * tolerance asked for.
 */
export function cost(kit: CostKit, { answers }: StrategyContext): StrategyCost {
  const factor = kit.factoriseSystem({ lowRank: true });
  const dropTolerance = Math.max(1e-12, answers.tolerance / 100);
  const steps = 2 + Math.max(0, Math.round(-Math.log10(answers.tolerance) / 8));
  const residual = kit.iterationSeconds({ nonzeros: kit.system.nonzeros, unknowns: kit.system.unknowns, vectors: 4, reductions: 1 });
  return {
    iterations: steps,
    iterationBound: null,
    interval: null,
    memoryBytes: factor.memoryBytes + kit.storageBytes(0, kit.system.unknowns, 8),
    setupSeconds: factor.analysisSeconds + factor.factorSeconds,
    solveSeconds: steps * (factor.solveSeconds + residual),
    factor: { entries: factor.entries, flops: factor.flops },
    parameters: { dropTolerance },
    notes: [],
    why: factor.why,
    accuracy: "theory",
  };
}
