import { describe, expect, it } from "vitest";
import { benchPackFiles } from "@/lib/bench-pack/bench-pack";
import { slurmRequest, slurmTime } from "@/lib/bench-pack/slurm-request";
import { sampleCandidate, samplePack } from "./sample-pack";

const paths = (pack = samplePack()) => benchPackFiles(pack).map(({ path }) => path);
const textOf = (path: string, pack = samplePack()) => benchPackFiles(pack).find((file) => file.path === `saddlemark-case-12/${path}`)?.text ?? "";

describe("a pack", () => {
  it("holds driver, README, options of each candidate, and a recipe where options can't express it", () => {
    expect(paths().sort()).toEqual(
      ["README.txt", "options/direct-ldlt.petsc", "options/schur-diag-amg.petsc", "recipes/p-multigrid.txt", "run.sh"].map((path) => `saddlemark-case-12/${path}`),
    );
  });

  it("holds calling lines where the options need them, and says so", () => {
    const candidate = sampleCandidate("bddc", { file: { kind: "petsc", filename: "bddc.petsc", text: "", callingLines: "ksp.setUp()" } });
    const pack = samplePack({ candidates: [candidate] });
    expect(textOf("calling-lines/bddc.py", pack)).toBe("ksp.setUp()\n");
    expect(textOf("README.txt", pack)).toContain("needs calling-lines/bddc.py");
  });

  it("does not run what is a recipe only", () => {
    expect(textOf("run.sh")).toContain("candidates='direct-ldlt schur-diag-amg'");
    expect(textOf("README.txt")).toContain("recipe only, not run");
  });

  it("tells the cautions of an estimate", () => {
    expect(textOf("README.txt")).toContain("no guarantee");
    expect(textOf("README.txt")).toContain("whether the model or the mesh is right");
  });
});

describe("what a pack asks a cluster for", () => {
  // By hand: 4 GiB x 1024 x 1.25 / 2 nodes + 200 MiB x 16 tasks = 5760 MiB; 2 x (100 s x 1.5 + 300 s) = 900 s.
  it("is memory of the largest candidate and the sum of all times", () => {
    expect(slurmRequest(samplePack())).toEqual({ memoryMiB: 5760, serialSeconds: 900, arraySeconds: 450 });
  });

  it("is never more than a node has, nor more time than the case allows each", () => {
    const hardware = { cores: 32, nodes: 2, memoryPerNodeGiB: 4, timeLimitSeconds: 60 };
    expect(slurmRequest(samplePack({ hardware }))).toEqual({ memoryMiB: 4096, serialSeconds: 720, arraySeconds: 360 });
  });

  // Slurm's sbatch manual, --time: days-hours:minutes:seconds.
  it.each([
    [1, "00:01:00"],
    [3600, "01:00:00"],
    [86_400, "1-00:00:00"],
    [90_061, "1-01:02:00"],
  ])("%i s is written %s", (seconds, text) => {
    expect(slurmTime(seconds)).toBe(text);
  });
});
