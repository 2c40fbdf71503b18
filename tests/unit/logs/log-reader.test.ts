import { describe, expect, it } from "vitest";
import { join } from "node:path";
import { readFileSync } from "node:fs";
import { convergedReasons } from "@/lib/logs/converged-reasons";
import type { ParsedLog } from "@/lib/logs/parsed-log";
import { logFolder, readText } from "./read-log";

/** Read by eye from the logs in tests/reference/logs/more (PETSc 3.18.5, MUMPS 5.5.1). */
const more: { file: string; parsed: Partial<ParsedLog>; what: string }[] = [
  { file: "direct_blr_mumps_icntl4.log", what: "block low-rank compression and a memory view", parsed: { strategy: "direct-blr", factorEntries: 31_432, peakMemoryGiB: 8.1142e7 / 2 ** 30, outcome: "converged", trueRelativeResidual: 1.222114309371e-10, solves: 1 } },
  { file: "fgmres_schur_full_nested_monitors.log", what: "a Schur factorisation, inner monitors left aside", parsed: { strategy: "schur-triangular", krylovMethod: "fgmres", iterations: 13, solves: 1, monitoredNorm: "unpreconditioned", trueRelativeResidual: 3.086019894398e-6, setupSeconds: 2.2172e-3, solveSeconds: 6.7542e-3 } },
  { file: "fgmres_three_solves_nested.log", what: "three solves: the last one, no time of one", parsed: { strategy: null, iterations: 39, solves: 3, setupSeconds: null, solveSeconds: null } },
  { file: "minres_gamg_np2_tagged_output.log", what: "tagged output of two processes; its own test met with a wrong answer", parsed: { strategy: "schur-diag-amg", processes: 2, iterations: 26, outcome: "broken", trueRelativeResidual: 1.555158297543, unusedOptions: ["-bogus"], peakMemoryGiB: 1.577e8 / 2 ** 30 } },
  { file: "gmres5_singular_values.log", what: "the singular-value monitor", parsed: { strategy: "schur-diag-direct", krylovMethod: "gmres", restart: 5, iterations: 30, trueRelativeResidual: null, factorEntries: 4_859 } },
  { file: "direct_workspace_error_banner.log", what: "an error with MUMPS' code", parsed: { outcome: "broken", reasonText: "MUMPS' work space is too small (-9); raise ICNTL(14).", iterations: null, solves: 0 } },
  { file: "direct_workspace_mumps_statistics.log", what: "MUMPS' own return code", parsed: { outcome: "broken", reason: "DIVERGED_PC_FAILED", strategy: "direct-ldlt", reasonText: "MUMPS' work space is too small (-9); raise ICNTL(14)." } },
  { file: "minres_augmented_gamg_short_monitor.log", what: "the short monitor and a detailed view", parsed: { strategy: "regularized-amg", iterations: 344, outcome: "converged", setupSeconds: 6.0006e-3, solveSeconds: 2.5694e-2, factorEntries: null } },
];

it.each(more)("reads $what", ({ file, parsed }) => {
  expect(readText(readFileSync(join(logFolder, "more", file), "latin1"))).toMatchObject(parsed);
});

const monitor = "  0 KSP Residual norm 1.000000000000e+00 \n  1 KSP Residual norm 1.000000000000e-09 \n";

describe("wording of other versions (from memory of PETSc's sources)", () => {
  it.each([
    { text: "KSP Object: 4 MPI processes\n  type: cg\n", field: "processes", value: 4 },
    { text: "KSP Object: 1 MPI processes\n  type: cg\n", field: "processes", value: 1 },
    { text: "KSP Object:(flow_) 4 MPI processes\n  type: minres\n", field: "krylovMethod", value: "minres" },
    { text: "KSP Object:\n  type: gmres\n    GMRES: restart=20, using Modified Gram-Schmidt\n", field: "restart", value: 20 },
    { text: "Option left: name:-foo (no value) source: command line\n", field: "unusedOptions", value: ["-foo"] },
    { text: "Option left: name:-foo value: 3 source: file\n", field: "unusedOptions", value: ["-foo"] },
    { text: "Option left: name:-foo no value \n", field: "unusedOptions", value: ["-foo"] },
    { text: `${monitor}Linear flow_ solve converged due to CONVERGED_RTOL iterations 1\n`, field: "iterations", value: 1 },
    { text: "  0 KSP preconditioned resid norm 1.000000000000e+00 true resid norm 2.000000000000e+00 ||Ae||/||Ax|| 1.000000000000e+00\n  1 KSP preconditioned resid norm 1.000000000000e-08 true resid norm 2.000000000000e-08 ||Ae||/||Ax|| 1.000000000000e-08\nLinear solve converged due to CONVERGED_RTOL iterations 1\n", field: "monitoredRelativeResidual", value: 1e-8 },
  ] as const)("reads $field from $text", ({ text, field, value }) => {
    expect(readText(text)[field]).toEqual(value);
  });
});

describe("the converged reason decides the outcome", () => {
  const expected: Record<string, string | null> = { converged: "converged", stalled: "stalled", diverged: "diverged", fixed: "converged", "set-up-failed": "broken", other: null };
  it.each(Object.entries(convergedReasons))("%s means %s", (name, meaning) => {
    const verb = name.startsWith("CONVERGED") ? "converged" : "did not converge";
    expect(readText(`Linear solve ${verb} due to ${name} iterations 1\n`).outcome).toBe(expected[meaning]);
  });

  it("an unknown reason leaves the outcome open", () => {
    const result = readText("Linear solve did not converge due to DIVERGED_WEATHER iterations 3\n");
    expect(result).toMatchObject({ outcome: null, reason: "DIVERGED_WEATHER", iterations: 3 });
    expect(result.problems[0]?.line).toBe(1);
  });

  it("a reason whose name and verb disagree leaves it open", () => {
    expect(readText("Linear solve converged due to DIVERGED_ITS iterations 3\n").outcome).toBeNull();
  });
});

describe("what the log does not say, or says twice, is null", () => {
  it.each([
    { why: "only monitors", text: monitor, field: "iterations" },
    { why: "two different true residuals", text: `Linear solve converged due to CONVERGED_RTOL iterations 1\nTrue relative residual = 1e-08\nTrue relative residual = 1e-03\n`, field: "trueRelativeResidual" },
    { why: "a true residual far from the monitor's", text: "  0 KSP preconditioned resid norm 1.000000000000e+00 true resid norm 1.000000000000e+00 ||r(i)||/||b|| 1.000000000000e+00\n  1 KSP preconditioned resid norm 1.000000000000e-08 true resid norm 1.000000000000e-08 ||r(i)||/||b|| 1.000000000000e-08\nLinear solve converged due to CONVERGED_RTOL iterations 1\nTrue relative residual = 1e-03\n", field: "trueRelativeResidual" },
    { why: "fewer residuals than iterations", text: `${monitor}Linear solve converged due to CONVERGED_RTOL iterations 12\n`, field: "monitoredRelativeResidual" },
    { why: "fewer residuals than iterations", text: `${monitor}Linear solve converged due to CONVERGED_RTOL iterations 12\n`, field: "iterations" },
    { why: "a reason cut at the end of the file", text: `${monitor}Linear solve converged due to CONVERGED_RTOL iterations 1`, field: "iterations" },
  ] as const)("$field with $why", ({ text, field }) => {
    const result = readText(text);
    expect(result[field]).toBeNull();
    expect(result.problems.length).toBeGreaterThan(0);
  });

  it("processes when the solver and the program disagree", () => {
    const text = "KSP Object: 1 MPI process\n  type: cg\n------ PETSc Performance Summary: ------\n\n./a on a  named h with 8 processors, by me Tue\n";
    expect(readText(text).processes).toBeNull();
  });

  it("a strategy stated against the solver view", () => {
    const shown = readFileSync(join(logFolder, "s2_minres_tet8-RT1_cb1e4_np1.log"), "latin1");
    expect(readText(`# Saddlemark strategy: bddc\n${shown}`).strategy).toBeNull();
    expect(readText(`# Saddlemark strategy: schur-diag-direct\n${shown}`).strategy).toBe("schur-diag-direct");
  });
});

it("takes the strategy a job script names where the solver view names none", () => {
  expect(readText("# Saddlemark strategy: hybridized-amg\nLinear solve converged due to CONVERGED_RTOL iterations 7\n")).toMatchObject({ strategy: "hybridized-amg", iterations: 7 });
});

describe("a job that was ended", () => {
  it.each([
    { line: "slurmstepd: error: *** JOB 123 ON n42 CANCELLED AT 2026-12-01T04:00:00 DUE TO TIME LIMIT ***", outcome: "over-time" },
    { line: "=>> PBS: job killed: walltime 3610 exceeded limit 3600", outcome: "over-time" },
    { line: "slurmstepd: error: Detected 1 oom-kill event(s) in step 123.0 cgroup.", outcome: "out-of-memory" },
    { line: "[0]PETSC ERROR: Out of memory. This could be due to allocating", outcome: "out-of-memory" },
    { line: "[3]PETSC ERROR: Caught signal number 11 SEGV: Segmentation Violation", outcome: "broken" },
    { line: "[0]PETSC ERROR: Caught signal number 15 Terminate: Some process (or the batch system) has told this process to end", outcome: null },
  ] as const)("$line", ({ line, outcome }) => {
    const result = readText(`${monitor}${line}\n`);
    expect(result.outcome).toBe(outcome);
    expect(result.problems.some((problem) => problem.line === 3)).toBe(true);
  });
});

it("says that an empty log is empty and that prose is no log", () => {
  expect(readText("").problems).toEqual([{ line: null, text: "The log is empty.", severity: "error" }]);
  expect(readText("Dear colleague,\nthe run went well.\n").problems[0]?.severity).toBe("error");
});

it("reads a last line without an end only when told that the text is whole", () => {
  const text = "Linear solve converged due to CONVERGED_RTOL iterations 39";
  expect(readText(text).iterations).toBeNull();
  expect(readText(text, { trustLastLine: true }).iterations).toBe(39);
});

it("keeps a bounded history with the first and the last residual", () => {
  const count = 100_003;
  const lines = Array.from({ length: count }, (_, index) => `${String(index).padStart(3)} KSP Residual norm ${(1 / (index + 1)).toExponential(12).replace(/e([+-])(\d)$/, "e$10$2")} \n`);
  const result = readText(`${lines.join("")}Linear solve did not converge due to DIVERGED_ITS iterations ${count - 1}\n`);
  expect(result.residualHistory.length).toBeLessThanOrEqual(20_001);
  expect(result.residualHistory[0]?.iteration).toBe(0);
  expect(result.residualHistory[1]?.iteration).toBe(result.historyStride);
  expect(result.residualHistory.at(-1)?.iteration).toBe(count - 1);
  expect(result.iterations).toBe(count - 1);
});
