import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";
import type { StrategyContext } from "../strategy";

/** CG in the benign space: a matrix product, two substitutions in every subdomain and one with the coarse problem an iteration. */
export function cost(kit: CostKit, { answers }: StrategyContext): StrategyCost {
  const count = kit.iterations.bddc(answers.tolerance);
  const factor = kit.subdomains("bddc");
  const { unknowns, nonzeros } = kit.system;
  const iteration = iterationCost(kit, { nonzeros, unknowns, vectors: 10, reductions: 2 }, { name: "two substitutions", seconds: 2 * factor.solveSeconds });
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: null,
    memoryBytes: kit.storageBytes(nonzeros, unknowns, 10) + 2 * factor.memoryBytes,
    setupSeconds: 2 * (factor.analysisSeconds + factor.factorSeconds),
    solveSeconds: count.expected * iteration.seconds,
    factor: { entries: factor.entries, flops: factor.flops },
    parameters: {},
    notes: [],
    why: [...count.why, iteration.why, ...factor.why],
    accuracy: "theory",
  };
}
