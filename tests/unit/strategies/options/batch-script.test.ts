import { describe, expect, it } from "vitest";
import { batchScript } from "@/lib/strategies/batch-script";
import { optionsContext } from "../../../support/petsc/options-context";

describe("batchScript", () => {
  it.each([
    { name: "one node", given: { memoryGiBHigh: 10, cores: 32 }, mem: 10 * 1024 * 1.25 + 200 * 32 },
    { name: "two nodes share the memory", given: { memoryGiBHigh: 10, cores: 64, nodes: 2 }, mem: 5 * 1024 * 1.25 + 200 * 32 },
    { name: "never more than the node has", given: { memoryGiBHigh: 500, cores: 32 }, mem: 128 * 1024 },
  ])("asks for the estimate's high end with a quarter more and room for the processes: $name", ({ given, mem }) => {
    expect(batchScript(optionsContext(given))).toContain(`#SBATCH --mem=${mem}M\n`);
  });

  it.each([
    { name: "half more and five minutes", total: 1000, limit: null, time: "00:30:00" },
    { name: "days", total: 100_000, limit: null, time: "1-17:45:00" },
    { name: "the case's limit caps it", total: 10_000, limit: 3600, time: "01:00:00" },
    { name: "the case's limit without an estimate", total: null, limit: 7200, time: "02:00:00" },
    { name: "an hour when nothing is known", total: null, limit: null, time: "01:00:00" },
  ])("asks for time: $name", ({ total, limit, time }) => {
    const script = batchScript({ ...optionsContext({ timeLimitSeconds: limit }), totalSecondsHigh: total });
    expect(script).toContain(`#SBATCH --time=${time}\n`);
  });

  it("says so where the memory will not do", () => {
    expect(batchScript(optionsContext({ memoryGiBHigh: 500 }))).toContain("expect it to run out; take more nodes");
  });

  it("takes the hardware and the strategy's file, one process a core", () => {
    const script = batchScript({ ...optionsContext({ cores: 48, nodes: 2 }), strategy: "direct-ldlt" });
    for (const line of ["#SBATCH --nodes=2", "#SBATCH --ntasks=48", "#SBATCH --ntasks-per-node=24", "#SBATCH --job-name=direct-ldlt"]) {
      expect(script.split("\n")).toContain(line);
    }
    expect(script).toContain("direct-ldlt.petsc");
    expect(script.startsWith("#!/bin/bash\n")).toBe(true);
  });
});
