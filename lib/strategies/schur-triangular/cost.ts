import type { CostKit, StrategyCost } from "../cost";
import { iterationCost } from "../iteration-step";

/** Krylov vectors kept before a restart. */
const restart = 30;

/**
 * FGMRES with the full block factorisation of diag(A) and one multigrid cycle on the Schur complement; it monitors the true residual. An
 * iteration applies the matrix, B and Bᵀ again, and orthogonalises against half of the restart's vectors on average.
 */
export function cost(kit: CostKit, { answers }: { answers: { tolerance: number } }): StrategyCost {
  const count = kit.iterations.blockFactorised(answers.tolerance);
  const multigrid = kit.multigridOn("schur");
  const { unknowns, nonzeros } = kit.system;
  const orthogonalised = Math.min(restart, count.expected) / 2;
  const traffic = { nonzeros: 1.3 * nonzeros, unknowns, vectors: 10 + 4 * orthogonalised, reductions: 2 };
  const iteration = iterationCost(kit, traffic, { name: "one multigrid cycle", seconds: multigrid.cycleSeconds });
  return {
    iterations: count.expected,
    iterationBound: null,
    interval: kit.spectralInterval(),
    memoryBytes: kit.storageBytes(nonzeros, unknowns, 10 + 2 * restart) + multigrid.memoryBytes,
    setupSeconds: kit.streamSeconds(48 * (kit.system.velocityNonzeros + kit.system.schurNonzeros)) + multigrid.setupSeconds,
    solveSeconds: count.expected * iteration.seconds,
    factor: null,
    parameters: { restart },
    notes: [],
    why: [...count.why, iteration.why, ...multigrid.why],
    accuracy: "block-factorised",
  };
}
