import type { CostKit, StrategyCost } from "../cost";

/** Factorise once, then one substitution a solve: no iterations to speak of. */
export function cost(kit: CostKit): StrategyCost {
  const factor = kit.factoriseSystem({ lowRank: false });
  return {
    iterations: 1,
    iterationBound: null,
    interval: null,
    memoryBytes: factor.memoryBytes + kit.storageBytes(0, kit.system.unknowns, 4),
    setupSeconds: factor.analysisSeconds + factor.factorSeconds,
    solveSeconds: factor.solveSeconds,
    factor: { entries: factor.entries, flops: factor.flops },
    parameters: {},
    notes: [],
    why: factor.why,
    accuracy: "direct",
  };
}
