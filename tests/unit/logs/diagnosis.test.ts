import { describe, expect, it } from "vitest";
import { diagnoseRun } from "@/lib/runs/diagnosis/diagnose-run";
import type { DiagnosedRun, DiagnosisInput } from "@/lib/runs/diagnosis/diagnosis-input";
import { findings } from "@/lib/runs/diagnosis/findings";
import { findRestartEffect, findStagnation, slopeOf } from "@/lib/runs/diagnosis/residual-trend";
import { logText, readText } from "./read-log";

function fromLog(file: string, limits: DiagnosisInput["limits"] = { tolerance: 1e-8 }, otherRuns: DiagnosedRun[] = []) {
  const parsed = readText(logText(file));
  return diagnoseRun({ run: { ...parsed, cores: parsed.processes }, parsed, limits, otherRuns });
}

function run(values: Partial<DiagnosedRun>): DiagnosedRun {
  return { outcome: "converged", strategy: "schur-diag-amg", ...values };
}

const ids = (found: readonly { id: string }[]) => found.map(({ id }) => id).sort();

/** What is conspicuous in the genuine logs, judged from their figures by eye. */
describe("genuine logs", () => {
  it.each([
    { file: "s1_direct_mumps_ldlt_tet12-RT1_np1.log", expected: ["setup-dominates"] },
    { file: "s1_direct_failed_workspace_tet8-RT1_cb1e4_np1.log", expected: ["workspace-too-small"] },
    { file: "s2_gmres_hex8-NCF2_cb1e4_np1.log", expected: ["true-residual-not-met"] },
    { file: "s2_minres_tet8-RT1_cb1e4_np2.log", expected: ["load-imbalance", "true-residual-not-met"] },
    { file: "options_left_s3_minres_hypre_tet8-RT1_np1.log", expected: ["unused-options"] },
    { file: "error_ilu_missing_diagonal_tet8-RT1_np1.log", expected: ["zero-pivot"] },
    { file: "fail_cg_indefinite_tet8-RT1_np1.log", expected: ["indefinite-system"] },
  ])("$file: $expected", ({ file, expected }) => {
    const limits = file.includes("np2") || file.includes("gmres") ? { tolerance: 1e-8 } : { tolerance: 1e-7 };
    expect(ids(fromLog(file, limits))).toEqual(expected);
  });

  it("an unpreconditioned GMRES that stalls is said to, with where and how slow", () => {
    const [first] = fromLog("fail_maxit_gmres_none_hex8-NCF2_cb1e4_np1.log");
    expect(first).toMatchObject({ id: "stagnation", severity: "failure" });
    expect(first?.evidence["decadesPerIteration"]).toBeLessThan(0);
  });

  it("names the lines that show it", () => {
    const found = fromLog("options_left_s3_minres_hypre_tet8-RT1_np1.log", { tolerance: 1e-7 });
    expect(found[0]?.lines).toEqual([307]);
    const text = logText("s2_minres_tet8-RT1_cb1e4_np2.log").split("\n");
    const imbalance = fromLog("s2_minres_tet8-RT1_cb1e4_np2.log").find(({ id }) => id === "load-imbalance");
    expect(imbalance?.evidence["ratio"]).toBe(4.54);
    expect(text[(imbalance?.lines[0] ?? 1) - 1]).toContain("Flops:");
  });
});

/** Thresholds are the product's own (10x the tolerance) or common practice, no source. */
describe("runs without a log", () => {
  it.each([
    { why: "true residual 11 times the tolerance", input: { run: run({ trueRelativeResidual: 1.1e-5 }), limits: { tolerance: 1e-6 } }, expected: ["true-residual-not-met"] },
    { why: "true residual 9 times the tolerance", input: { run: run({ trueRelativeResidual: 9e-6 }), limits: { tolerance: 1e-6 } }, expected: [] },
    { why: "set-up of 9 s against one solve of 1 s", input: { run: run({ setupSeconds: 9, solveSeconds: 1 }), limits: {} }, expected: ["setup-dominates"] },
    { why: "the same set-up for 100 solves", input: { run: run({ setupSeconds: 9, solveSeconds: 1 }), limits: { repeatedSolves: 100 } }, expected: [] },
    { why: "95 of 100 GiB", input: { run: run({ peakMemoryGiB: 95 }), limits: { memoryGiB: 100 } }, expected: ["memory-near-limit"] },
    { why: "50 of 100 GiB", input: { run: run({ peakMemoryGiB: 50 }), limits: { memoryGiB: 100 } }, expected: [] },
    { why: "memory exhausted", input: { run: run({ outcome: "out-of-memory" }), limits: {} }, expected: ["out-of-memory"] },
    { why: "nothing recorded", input: { run: run({}), limits: {} }, expected: [] },
  ] as const)("$why: $expected", ({ input, expected }) => {
    expect(ids(diagnoseRun({ ...input, otherRuns: [] }))).toEqual(expected);
  });

  it("compares with the same strategy on fewest cores: 8 s on 1, 4 s on 8 is a quarter of the ideal", () => {
    const otherRuns = [run({ cores: 1, setupSeconds: 2, solveSeconds: 6 }), run({ cores: 2, setupSeconds: 1, solveSeconds: 3.5 }), run({ strategy: "bddc", cores: 1, setupSeconds: 99, solveSeconds: 99 })];
    const [found] = diagnoseRun({ run: run({ cores: 8, setupSeconds: 1, solveSeconds: 3 }), limits: {}, otherRuns });
    expect(found).toMatchObject({ id: "poor-parallel-efficiency", evidence: { speedup: 2, efficiency: 0.25, baseProcesses: 1 } });
  });
});

describe("trends of residuals", () => {
  const line = (slope: (iteration: number) => number, count: number) => {
    let level = 0;
    return Array.from({ length: count }, (_, iteration) => {
      level += iteration === 0 ? 0 : slope(iteration);
      return { iteration, monitored: 10 ** level };
    });
  };

  it("the slope of a geometric sequence is its rate", () => {
    expect(slopeOf(line(() => -0.25, 20))).toBeCloseTo(-0.25, 12);
  });

  it("finds the tail that stands still and leaves a steady fall alone", () => {
    expect(findStagnation(line((iteration) => (iteration <= 50 ? -0.1 : -0.0001), 200))).toMatchObject({ decadesPerIteration: expect.closeTo(-0.0001, 3) });
    expect(findStagnation(line((iteration) => (iteration <= 50 ? -0.1 : -0.0001), 200))?.fromIteration).toBeGreaterThanOrEqual(44);
    expect(findStagnation(line(() => -0.05, 200))).toBeNull();
    expect(findStagnation(line(() => -0.001, 5))).toBeNull();
  });

  it("finds plateaus behind restarts and none in a steady fall", () => {
    const plateaus = line((iteration) => (iteration % 30 < 10 && iteration >= 30 ? -0.001 : -0.1), 150);
    expect(findRestartEffect(plateaus, 30)).toMatchObject({ restart: 30, stalledRestarts: 4, restarts: 4 });
    expect(findRestartEffect(line(() => -0.1, 150), 30)).toBeNull();
    expect(findRestartEffect(plateaus.slice(0, 40), 30)).toBeNull();
  });
});

it("says of every finding what to try and where that comes from", () => {
  for (const { title, whatToTry, source } of Object.values(findings)) {
    expect(title.length).toBeGreaterThan(5);
    expect(whatToTry.length).toBeGreaterThan(40);
    expect(source.citation.length).toBeGreaterThan(10);
  }
});
