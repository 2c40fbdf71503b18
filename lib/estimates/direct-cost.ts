import type { CostStep, DirectCost } from "@/lib/strategies/cost";
import type { ModelConstants } from "./constants";
import type { FrontLevel, FrontTree } from "./front-model";
import type { MachineModel } from "./machine-model";

export type FactorisedMatrix = { name: string; unknowns: number; nonzeros: number; tree: FrontTree; separator: { cells: number; perArea: number; thickness: number } };

/**
 * Memory and time of a factorisation by its tree of fronts.
 *
 * Analysis is sequential: a cost per nonzero and per unknown. A level of the tree keeps fronts x q(m) cores busy, m = p + b rows, q = max(1, (m / block)^2) of a
 * two-dimensional distribution; its time is flops / (rate x cores in use), times an overhead that grows with every doubling of the cores. A
 * substitution reads every entry twice at the bandwidth of the cores in use, q = max(1, m / block), and waits for one message a level and direction.
 * Peak memory: 8 bytes an entry and the stack of contributions above it, more of it on many processes, and the input matrix.
 */
export function directCost(matrix: FactorisedMatrix, machine: MachineModel, constants: ModelConstants, lowRank: boolean): DirectCost {
  const compression = lowRank ? lowRankShares(matrix.tree, constants) : { entries: 1, flops: 1 };
  const entries = matrix.tree.entries * compression.entries;
  const flops = matrix.tree.flops * compression.flops;
  const doublings = Math.log2(machine.cores);
  const analysisSeconds = constants.analysisSecondsPerNonzero * matrix.nonzeros + constants.analysisSecondsPerUnknown * matrix.unknowns;
  const factorOverhead = 1 + constants.factorOverheadPerDoubling * doublings;
  let factorSeconds = 0;
  let solveSeconds = 0;
  for (const level of matrix.tree.levels) {
    factorSeconds += levelFactorSeconds(level, machine, constants, compression) * factorOverhead;
    solveSeconds += levelSolveSeconds(level, machine, constants, compression.entries, 16 * entries);
  }
  const parallelStack = 1 + constants.stackOverheadParallel * (1 - 1 / machine.cores);
  const memoryBytes = 8 * entries * constants.stackOverhead * parallelStack + 24 * matrix.nonzeros * constants.inputOverhead;
  const cost = { entries, flops, analysisSeconds, factorSeconds, solveSeconds, memoryBytes };
  return { ...cost, why: steps(matrix, machine, cost) };
}

function levelFactorSeconds(level: FrontLevel, machine: MachineModel, constants: ModelConstants, share: { entries: number; flops: number }): number {
  const rows = level.pivots + level.border;
  const used = Math.min(machine.cores, level.fronts * Math.max(1, (rows / constants.frontBlock) ** 2));
  const compute = (level.flops * share.flops) / (machine.flopsPerSecondPerCore * used);
  const assemble = (level.entries * share.entries * constants.frontSecondsPerEntry) / used;
  const panels = used > level.fronts ? (rows / constants.frontBlock) * machine.latencySeconds * Math.log2(machine.cores) : 0;
  const moved = used > 1 ? (4 * level.fronts * level.border ** 2) / machine.networkBytesPerSecond : 0;
  return compute + assemble + panels + moved;
}

function levelSolveSeconds(level: FrontLevel, machine: MachineModel, constants: ModelConstants, share: number, workingSet: number): number {
  const rows = level.pivots + level.border;
  const used = Math.min(machine.cores, level.fronts * Math.max(1, rows / constants.substitutionBlock));
  const bytes = 16 * level.entries * share;
  const inCache = constants.cacheAdvantage + ((1 - constants.cacheAdvantage) * workingSet) / (workingSet + machine.cacheBytes);
  const overhead = 1 + constants.substitutionOverheadPerDoubling * Math.log2(machine.cores);
  const stream = (bytes * inCache * overhead) / (machine.bandwidth(used) * constants.substitutionEfficiency);
  return stream + (machine.cores > 1 ? 2 * (constants.substitutionSyncSeconds + machine.latencySeconds * Math.log2(machine.cores)) : 0);
}

/**
 * Share of entries and flops that block low-rank compression leaves: fronts below a size keep all, larger ones lose more the larger they are, as
 * (rows / m)^(-1/2) in entries and its square in flops (practice: between m log m and m^(3/2) instead of m^2), never below a floor.
 */
function lowRankShares(tree: FrontTree, constants: ModelConstants): { entries: number; flops: number } {
  let entries = 0;
  let flops = 0;
  for (const level of tree.levels) {
    const share = Math.max(constants.lowRankGain, Math.min(1, Math.sqrt(constants.lowRankRows / Math.max(1, level.pivots + level.border))));
    entries += level.entries * share;
    flops += level.flops * share * share;
  }
  return { entries: entries / tree.entries, flops: flops / tree.flops };
}

function steps(matrix: FactorisedMatrix, machine: MachineModel, cost: Omit<DirectCost, "why">): CostStep[] {
  const { name, separator, tree } = matrix;
  const source = "Nested-dissection front model (George 1973; Lipton, Rose & Tarjan 1979), separator thickness fitted to reference runs";
  const rates = "Rates of the machine sheet; analysis, assembly and substitution rates fitted to reference runs, parallel overheads are practice";
  const step = (quantity: string, formula: string, inputs: CostStep["inputs"], value: number, unit: string, from: string): CostStep => ({
    quantity: `${quantity} of ${name}`,
    formula,
    inputs,
    value,
    unit,
    source: from,
  });
  const entries = { name: "factor entries", value: cost.entries, unit: "" };
  return [
    step("Root separator", "p = t w N^(2/3)", [
      { name: "t, thickness", value: separator.thickness, unit: "" },
      { name: "w, unknowns per N^(2/3) cells of a flat cut", value: separator.perArea, unit: "" },
      { name: "N, cells", value: separator.cells, unit: "" },
    ], tree.levels[0]?.pivots ?? 0, "unknowns", source),
    step("Factor entries", "sum over levels l of 2^l (p^2/2 + p b)", [{ name: "levels", value: tree.levels.length, unit: "" }], cost.entries, "entries", source),
    step("Factor flops", "sum over levels l of 2^l (p^3/3 + p^2 b + p b^2)", [entries], cost.flops, "flop", source),
    step("Set-up", "analysis (sequential) + sum over levels of flops / (rate x cores in use)", [
      { name: "nonzeros", value: matrix.nonzeros, unit: "" },
      { name: "flops", value: cost.flops, unit: "flop" },
      { name: "rate of a core", value: machine.flopsPerSecondPerCore, unit: "flop/s" },
      { name: "analysis", value: cost.analysisSeconds, unit: "s" },
    ], cost.analysisSeconds + cost.factorSeconds, "s", rates),
    step("Substitution", "sum over levels of 16 bytes x entries / bandwidth of the cores in use + messages", [entries], cost.solveSeconds, "s", rates),
    step("Peak memory", "8 bytes x entries x stack overhead + input", [entries], cost.memoryBytes, "B", "Stack overhead fitted to reference runs"),
  ];
}
