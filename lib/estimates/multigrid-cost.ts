import type { MultigridCost } from "@/lib/strategies/cost";
import type { ModelConstants } from "./constants";
import type { MachineModel } from "./machine-model";
import type { Variant } from "./variant";

export type MultigridBlock = { name: string; unknowns: number; nonzeros: number; kind: Variant["multigrid"]; sweeps: number };

/**
 * Algebraic multigrid on one block. A cycle moves the block's bytes `sweeps` times (smoothing, residuals and transfers on all levels), more as the operators
 * grow denser with size; each level waits for neighbour exchanges and reductions, which is what is left on many cores. Levels: one for every factor 8 in unknowns.
 * Set-up scales with the nonzeros, and its coarse levels do not with the cores.
 */
export function multigridCost(block: MultigridBlock, machine: MachineModel, constants: ModelConstants): MultigridCost {
  const aggregation = block.kind === "aggregation";
  const share = block.kind === "sparse" ? constants.sparseCoarseningShare : 1;
  const complexity = aggregation ? 1 : share * operatorComplexity(block.unknowns, constants.multigridGrowth);
  const setupPerNonzero = aggregation ? constants.aggregationSetupSecondsPerNonzero : constants.multigridSetupSecondsPerNonzero;
  const levels = Math.max(1, Math.ceil(Math.log(Math.max(2, block.unknowns)) / Math.log(8)));
  const bytes = 12 * block.nonzeros * complexity;
  const latency = machine.cores > 1 ? levels * constants.multigridPerLevelSyncs * machine.latencySeconds * (1 + Math.log2(machine.cores)) : 0;
  const cycleSeconds = machine.streamSeconds(bytes * block.sweeps, bytes) + latency;
  const work = setupPerNonzero * block.nonzeros * complexity * (1 + constants.multigridSetupPerDoubling * Math.log2(machine.cores));
  const setupSeconds = work / machine.cores + constants.multigridSetupCycles * latency;
  const memoryBytes = 1.5 * bytes + 16 * block.unknowns;
  return {
    setupSeconds,
    cycleSeconds,
    memoryBytes,
    why: [
      {
        quantity: `Multigrid cycle on ${block.name}`,
        formula: "sweeps x 12 bytes x nonzeros x complexity / bandwidth + levels x messages x latency",
        inputs: [
          { name: "nonzeros", value: block.nonzeros, unit: "" },
          { name: "complexity", value: complexity, unit: "" },
          { name: "sweeps", value: block.sweeps, unit: "" },
          { name: "levels", value: levels, unit: "" },
        ],
        value: cycleSeconds,
        unit: "s",
        source: "Sweeps and complexity fitted to reference runs; messages are practice",
      },
    ],
  };
}

/** From 1 on small systems to 1 + growth: coarse operators fill in three dimensions until the strong couplings are used up. */
function operatorComplexity(unknowns: number, growth: number): number {
  return 1 + (growth * unknowns) / (unknowns + 1e5);
}
