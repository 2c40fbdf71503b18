import type { ParsedLog } from "@/lib/logs/parsed-log";

/**
 * What the twelve genuine logs must be read as. `record` holds the figures that the run of the same configuration left
 * in the reference runs (column names there: iterations, true_rel_residual, mumps_infog29_entries,
 * mumps_infog20_entries_est, mumps_rinfog3_flops, mumps_infog22_MB_sum, ranks, unknowns_total), measured by the
 * libraries' own interfaces and not by reading a log; six digits are kept there. `runId` is null where no recorded run
 * has that configuration. `parsed` and `lines` were read from the text by eye. Times differ from run to run (the logs
 * were made apart), so they are checked against the text only.
 */
export type GenuineLog = {
  file: string;
  runId: string | null;
  record: { iterations?: number; trueResidual?: number; entries?: number; estimate?: number; flops?: number; megabytes?: number; ranks?: number; unknowns?: number };
  parsed: Partial<ParsedLog>;
  lines: Record<string, number>;
  historyPoints: number;
};

export const genuineLogs: readonly GenuineLog[] = [
  {
    file: "s1_direct_mumps_ldlt_tet12-RT1_np1.log",
    runId: "672ea2aa3955-0",
    record: { iterations: 1, trueResidual: 8.83432e-13, entries: 1_961_744, estimate: 1_783_579, flops: 5.7996e8, megabytes: 26, ranks: 1, unknowns: 30_240 },
    parsed: {
      strategy: "direct-ldlt", krylovMethod: "preonly", outcome: "converged", reason: "CONVERGED_ITS", processes: 1, setupSeconds: 0.75616,
      solveSeconds: 0.017569, monitoredNorm: "none", monitoredRelativeResidual: null, peakMemoryGiB: null, factorisation: "cholesky", factorPackage: "mumps", unusedOptions: [],
    },
    lines: { iterations: 3, krylovMethod: 5, factorEntries: 52, trueRelativeResidual: 69, setupSeconds: 138, solveSeconds: 141 },
    historyPoints: 2,
  },
  {
    file: "s1_direct_mumps_lu_hex8-NCF2_cb1e4_np1.log",
    runId: "6691f88583c6-0",
    record: { iterations: 1, trueResidual: 2.83867e-11, entries: 2_418_246, estimate: 2_320_116, flops: 4.48443e8, megabytes: 28, ranks: 1, unknowns: 15_616 },
    parsed: { strategy: "direct-ldlt", krylovMethod: "preonly", outcome: "converged", reason: "CONVERGED_ITS", setupSeconds: 0.38765, solveSeconds: 0.014797, factorisation: "lu" },
    lines: { iterations: 3, factorEntries: 52, trueRelativeResidual: 69, setupSeconds: 138, solveSeconds: 141 },
    historyPoints: 2,
  },
  {
    file: "s1_direct_failed_workspace_tet8-RT1_cb1e4_np1.log",
    runId: "ab5849971205-0",
    record: { iterations: 0, entries: 343_835, estimate: 293_623, flops: 4.46078e7, megabytes: 6, ranks: 1, unknowns: 8_832 },
    parsed: {
      strategy: "direct-ldlt", krylovMethod: "preonly", outcome: "broken", reason: "DIVERGED_PC_FAILED", trueRelativeResidual: null,
      monitoredRelativeResidual: null, setupSeconds: 0.13911, solveSeconds: null, monitoredNorm: "none",
    },
    lines: { iterations: 3, factorEntries: 53, setupSeconds: 139 },
    historyPoints: 1,
  },
  {
    file: "s2_minres_tet8-RT1_cb1e4_np1.log",
    runId: "2215d10dad9c-1",
    record: { iterations: 39, trueResidual: 1.01171e-7, entries: 115_347, estimate: 115_347, flops: 1.34996e7, megabytes: 2, ranks: 1, unknowns: 8_832 },
    parsed: {
      strategy: "schur-diag-direct", krylovMethod: "minres", outcome: "converged", reason: "CONVERGED_RTOL", setupSeconds: 0.042144, solveSeconds: 0.10622,
      monitoredNorm: "preconditioned", preconditioner: "fieldsplit", tolerances: { relative: 1e-8, absolute: 1e-50, divergence: 1e4, maximumIterations: 1000 },
    },
    lines: { iterations: 41, krylovMethod: 43, trueRelativeResidual: 157, factorEntries: 118, setupSeconds: 238, solveSeconds: 243 },
    historyPoints: 40,
  },
  {
    file: "s2_minres_tet8-RT1_cb1e4_np2.log",
    runId: null,
    record: {},
    parsed: {
      strategy: "schur-diag-direct", krylovMethod: "minres", outcome: "converged", reason: "CONVERGED_RTOL", iterations: 39, processes: 2, setupSeconds: 0.371,
      solveSeconds: 1.8892, trueRelativeResidual: 1.011704e-7, factorEntries: 112_709, monitoredNorm: "preconditioned", systemUnknowns: 8_832,
    },
    lines: { iterations: 41, processes: 42, factorEntries: 118, trueRelativeResidual: 157, setupSeconds: 243, solveSeconds: 248 },
    historyPoints: 40,
  },
  {
    file: "s2_gmres_hex8-NCF2_cb1e4_np1.log",
    runId: "c0992e693d71-0",
    record: { iterations: 70, trueResidual: 2.40474e-5, entries: 596_626, estimate: 596_626, flops: 1.62087e8, megabytes: 8, ranks: 1, unknowns: 15_616 },
    parsed: { strategy: "schur-diag-direct", krylovMethod: "gmres", outcome: "converged", restart: 200, setupSeconds: 0.16989, solveSeconds: 0.4932, monitoredNorm: "preconditioned" },
    lines: { iterations: 72, trueRelativeResidual: 190, factorEntries: 151, setupSeconds: 271, solveSeconds: 276 },
    historyPoints: 71,
  },
  {
    file: "s3_minres_hypre_tet16-RT1_np1.log",
    runId: "505c57bc4ff0-1",
    record: { iterations: 42, trueResidual: 4.30667e-7, ranks: 1, unknowns: 72_192 },
    parsed: { strategy: "schur-diag-amg", krylovMethod: "minres", outcome: "converged", setupSeconds: 0.41458, solveSeconds: 1.3, factorEntries: null, monitoredNorm: "preconditioned" },
    lines: { iterations: 44, trueRelativeResidual: 135, setupSeconds: 214, solveSeconds: 219 },
    historyPoints: 43,
  },
  {
    file: "s4_minres_gamg_tet8-RT1_gamma31.6_np1.log",
    runId: null,
    record: {},
    parsed: {
      strategy: "regularized-amg", krylovMethod: "minres", outcome: "converged", iterations: 177, processes: 1, setupSeconds: 0.046453, solveSeconds: 0.1094,
      trueRelativeResidual: 5.290493e-7, factorEntries: null, systemUnknowns: 8_832,
    },
    lines: { iterations: 179, trueRelativeResidual: 341, setupSeconds: 448, solveSeconds: 454 },
    historyPoints: 178,
  },
  {
    file: "options_left_s3_minres_hypre_tet8-RT1_np1.log",
    runId: null,
    record: {},
    parsed: {
      strategy: "schur-diag-amg", krylovMethod: "minres", outcome: "converged", iterations: 40, processes: 1, setupSeconds: 0.027006, solveSeconds: 0.051247,
      trueRelativeResidual: 6.953859e-8, unusedOptions: ["-fieldsplit_velocity_pc_type", "-pc_hypre_boomeramg_strong_threshold"], factorEntries: null,
    },
    lines: { iterations: 42, trueRelativeResidual: 133, unusedOptions: 307, setupSeconds: 212, solveSeconds: 217 },
    historyPoints: 41,
  },
  {
    file: "fail_cg_indefinite_tet8-RT1_np1.log",
    runId: "53bdba907526-0",
    record: { iterations: 1, trueResidual: 1, ranks: 1, unknowns: 8_832 },
    parsed: { strategy: null, krylovMethod: "cg", outcome: "diverged", reason: "DIVERGED_INDEFINITE_MAT", monitoredRelativeResidual: null, setupSeconds: 3.075e-6, solveSeconds: 1.3376e-3 },
    lines: { iterations: 2, krylovMethod: 4, trueRelativeResidual: 20, setupSeconds: 86, solveSeconds: 89 },
    historyPoints: 1,
  },
  {
    file: "fail_maxit_gmres_none_hex8-NCF2_cb1e4_np1.log",
    runId: null,
    record: {},
    parsed: {
      strategy: null, krylovMethod: "gmres", outcome: "stalled", reason: "DIVERGED_ITS", iterations: 60, restart: 30, processes: 1,
      trueRelativeResidual: 0.5867873, setupSeconds: 3.8e-7, solveSeconds: 0.17772, preconditioner: "none",
    },
    lines: { iterations: 62, trueRelativeResidual: 81, setupSeconds: 148, solveSeconds: 151, restart: 65 },
    historyPoints: 61,
  },
  {
    file: "error_ilu_missing_diagonal_tet8-RT1_np1.log",
    runId: "653b9188bce0-0",
    record: { ranks: 1 },
    parsed: {
      strategy: null, krylovMethod: null, outcome: "broken", reason: "Object is in wrong state: Matrix is missing diagonal entry 5760", iterations: null,
      setupSeconds: null, solveSeconds: null, trueRelativeResidual: null, solves: 0,
    },
    lines: { outcome: 14, processes: 22 },
    historyPoints: 0,
  },
];
