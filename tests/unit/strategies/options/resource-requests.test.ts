import { describe, expect, it } from "vitest";
import { resourceRequests } from "@/lib/strategies/resource-requests";
import { optionsContext } from "../../../support/petsc/options-context";

describe("resourceRequests", () => {
  it.each([
    { name: "one node", given: { memoryGiBHigh: 10, cores: 32 }, mem: 10 * 1024 * 1.25 + 200 * 32 },
    { name: "two nodes share the memory", given: { memoryGiBHigh: 10, cores: 64, nodes: 2 }, mem: 5 * 1024 * 1.25 + 200 * 32 },
    { name: "never more than the node has", given: { memoryGiBHigh: 500, cores: 32 }, mem: 128 * 1024 },
  ])("asks for the estimate's high end with a quarter more and room for the processes: $name", ({ given, mem }) => {
    expect(resourceRequests(optionsContext(given))).toContain(`#SBATCH --mem=${mem}M`);
  });

  it.each([
    { name: "half more and five minutes", total: 1000, limit: null, time: "00:30:00" },
    { name: "days", total: 100_000, limit: null, time: "1-17:45:00" },
    { name: "the case's limit caps it", total: 10_000, limit: 3600, time: "01:00:00" },
    { name: "the case's limit without an estimate", total: null, limit: 7200, time: "02:00:00" },
    { name: "an hour when nothing is known", total: null, limit: null, time: "01:00:00" },
  ])("asks for time: $name", ({ total, limit, time }) => {
    const requests = resourceRequests({ ...optionsContext({ timeLimitSeconds: limit }), totalSecondsHigh: total });
    expect(requests).toContain(`#SBATCH --time=${time}`);
  });

  it("says so where the memory will not do", () => {
    expect(resourceRequests(optionsContext({ memoryGiBHigh: 500 })).join("\n")).toContain("expect it to run out; take more nodes");
  });
});
