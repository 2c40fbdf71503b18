import { spawnSync } from "node:child_process";
import { describe, expect, it } from "vitest";
import { batchScript, type BatchScriptInput } from "@/lib/runs/batch-script";
import { toAnswers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { caseLimits } from "@/lib/runs/case-limits";

const { hardware } = toAnswers(questionnaireSchema.parse(defaultQuestionnaire), null);
const input: BatchScriptInput = {
  caseNumber: 12, strategy: "bddc", hardware, requests: ["#SBATCH --mem=1000M", "#SBATCH --time=00:10:00"], options: { filename: "case 12;rm.opts", text: "-ksp_type cg\nEND_OF_OPTIONS\nrm -rf /\n" }, baseUrl: "http://127.0.0.1:3000",
};

describe("batchScript", () => {
  it.each([
    ["with options", input],
    ["of a recipe only", { ...input, options: null }],
  ])("%s is a script that bash can read", (_name, one) => {
    const checked = spawnSync("bash", ["-n"], { input: batchScript(one), encoding: "utf8" });
    expect([checked.status, checked.stderr]).toEqual([0, ""]);
  });

  it("keeps the options inside their file whatever they hold", () => {
    const script = batchScript(input);
    expect(script.match(/END_OF_OPTIONS/g)).toHaveLength(2);
    expect(script).toContain("cat > case-12-rm.opts <<'END_OF_OPTIONS'\n-ksp_type cg\nrm -rf /\nEND_OF_OPTIONS");
  });

  it("takes the hardware and the strategy's file, one process a core", () => {
    const script = batchScript({ ...input, hardware: { ...hardware, cores: 48, nodes: 2 } });
    for (const line of ["#SBATCH --nodes=2", "#SBATCH --ntasks=48", "#SBATCH --ntasks-per-node=24", "#SBATCH --job-name=saddlemark-12-bddc"]) {
      expect(script.split("\n")).toContain(line);
    }
    expect(script.startsWith("#!/bin/bash\n")).toBe(true);
  });

  it("asks for what it is told, before any command", () => {
    const lines = batchScript(input).split("\n");
    const firstCommand = lines.findIndex((line) => line !== "" && !line.startsWith("#"));
    expect(lines.slice(0, firstCommand)).toEqual(expect.arrayContaining(["#SBATCH --mem=1000M", "#SBATCH --time=00:10:00", "#SBATCH --ntasks=32"]));
  });

  it.each([
    ["sends the log of a solver that said how it ended", "Linear solve converged due to CONVERGED_RTOL iterations 31", 'logs?strategy=bddc'],
    ["sends the outcome where the program was killed before that", "Killed: out of memory", '"outcome":"out-of-memory"'],
  ])("holds no key and %s", (_name, printed, sent) => {
    const script = batchScript({ ...input, options: null });
    expect(script).not.toContain("sdm_");
    const folder = spawnSync("mktemp", ["-d"], { encoding: "utf8" }).stdout.trim();
    const fakes = `mpiexec() { echo "${printed}"; }\ncurl() { echo "curl $*"; [[ "$*" == *@-* ]] && cat; return 0; }`;
    const ran = spawnSync("bash", ["-c", `${fakes}\n${script}`], { cwd: folder, encoding: "utf8", env: { ...process.env, PROGRAM: "solver", SADDLEMARK_KEY: "sdm_x" } });
    expect(ran.stdout).toContain(sent);
  });
});

describe("caseLimits", () => {
  it("sums the memory of all nodes", () => {
    expect(caseLimits({ tolerance: 1e-6, repeatedSolves: 3, hardware: { ...hardware, nodes: 4 } })).toMatchObject({ memoryGiB: 4 * hardware.memoryPerNodeGiB, repeatedSolves: 3 });
  });
});
