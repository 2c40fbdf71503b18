import type { BenchPack, PackCandidate } from "@/lib/bench-pack/bench-pack";
import type { StrategyId } from "@/lib/shared/strategy-ids";

export function sampleCandidate(strategy: StrategyId, change: Partial<PackCandidate> = {}): PackCandidate {
  return {
    strategy,
    name: `The strategy ${strategy}`,
    file: { kind: "petsc", filename: `${strategy}.petsc`, text: "-ksp_type minres\n", callingLines: null },
    recipe: ["First this.", "Then that."],
    totalSecondsHigh: 100,
    memoryGiBHigh: 4,
    ...change,
  };
}

/** A pack of three candidates, one of them a recipe only. */
export function samplePack(change: Partial<BenchPack> = {}): BenchPack {
  return {
    caseNumber: 12,
    title: "Aquifer block",
    baseUrl: "http://127.0.0.1:9",
    hardware: { cores: 32, nodes: 2, memoryPerNodeGiB: 64, timeLimitSeconds: null },
    candidates: [sampleCandidate("direct-ldlt"), sampleCandidate("schur-diag-amg"), sampleCandidate("p-multigrid", { file: { kind: "recipe-only", reason: "No hierarchy." } })],
    ...change,
  };
}
