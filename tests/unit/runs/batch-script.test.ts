import { spawnSync } from "node:child_process";
import { describe, expect, it } from "vitest";
import { batchScript, type BatchScriptInput } from "@/lib/runs/batch-script";
import { toAnswers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";
import { caseLimits } from "@/lib/runs/case-limits";

const { hardware } = toAnswers(questionnaireSchema.parse(defaultQuestionnaire), null);
const input: BatchScriptInput = {
  caseNumber: 12, strategy: "bddc", hardware, totalSecondsHigh: 30, options: { filename: "case 12;rm.opts", text: "-ksp_type cg\nEND_OF_OPTIONS\nrm -rf /\n" }, baseUrl: "http://127.0.0.1:3000",
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

  // Slurm's sbatch manual, --time: "days-hours:minutes:seconds".
  it.each([
    [null, 30, "00:10:00"],
    [null, 3600, "03:00:00"],
    [90 * 60, 30, "01:30:00"],
    [50 * 3600, 30, "2-02:00:00"],
  ])("with the limit %s s and a prediction of %i s asks for %s", (timeLimitSeconds, totalSecondsHigh, time) => {
    expect(batchScript({ ...input, totalSecondsHigh, hardware: { ...hardware, timeLimitSeconds } })).toContain(`#SBATCH --time=${time}\n`);
  });

  it("holds no key and reports the outcome that the program printed", () => {
    const log = "Linear solve converged due to CONVERGED_RTOL iterations 31";
    const script = batchScript({ ...input, options: null }).replace(/^ {4}curl [\s\S]*?&& echo$/m, "    cat");
    const folder = spawnSync("mktemp", ["-d"], { encoding: "utf8" }).stdout.trim();
    const ran = spawnSync("bash", ["-c", `mpiexec() { echo "${log}"; }\n${script}`], { cwd: folder, encoding: "utf8", env: { ...process.env, PROGRAM: "solver", SADDLEMARK_KEY: "sdm_x" } });
    expect(script).not.toContain("sdm_");
    expect(ran.stdout).toContain('{"strategy":"bddc","outcome":"converged","iterations":31,"cores":32,"followedAdvice":true');
  });
});

describe("caseLimits", () => {
  it("sums the memory of all nodes", () => {
    expect(caseLimits({ tolerance: 1e-6, repeatedSolves: 3, hardware: { ...hardware, nodes: 4 } })).toMatchObject({ memoryGiB: 4 * hardware.memoryPerNodeGiB, repeatedSolves: 3 });
  });
});
