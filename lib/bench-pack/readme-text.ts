import { packFolder, runnable, type BenchPack } from "./bench-pack";
import { slurmRequest, slurmTime } from "./slurm-request";

/** What a pack is and how to use it, for somebody who has only the archive. */
export function readmeText(pack: BenchPack): string {
  const { caseNumber, title, candidates, baseUrl } = pack;
  const { memoryMiB, serialSeconds, arraySeconds } = slurmRequest(pack);
  const runs = runnable(pack);
  return [
    `Bench pack of case ${caseNumber}${title === "" ? "" : `: ${title}`}`,
    "",
    "Runs several solver strategies with your own program on your own cluster, keeps the logs, and sends them back to",
    baseUrl,
    "",
    "Use",
    "",
    `  tar xzf ${packFolder(pack)}.tar.gz`,
    `  cd ${packFolder(pack)}`,
    "  export SADDLEMARK_PROGRAM='/path/to/my-solver -mesh /path/to/box.msh'    your program; it must read PETSc options",
    "  export SADDLEMARK_KEY=...                                a key that may write, from the team page",
    "  sh run.sh --dry-run                                      says what would be run",
    "  sh run.sh                                                here, one after the other",
    `  sbatch --export=ALL run.sh                               as a job of ${slurmTime(serialSeconds)}, ${memoryMiB} MiB a node`,
    `  sbatch --export=ALL --array=1-${Math.max(1, runs.length)} --time=${slurmTime(arraySeconds)} run.sh    one candidate a task`,
    "",
    "If the allocation ends, start the same again: finished candidates are not run twice, and a log is recorded once however",
    "often it is sent. sh run.sh --help lists options and variables. Nothing needs root.",
    "",
    "Candidates",
    "",
    ...candidates.map(({ strategy, name, file }) => `  ${strategy}: ${name}${noteOf(strategy, file)}`),
    "",
    "Calling lines are what options can't express, such as block sizes and null spaces; your program needs them before the options do",
    "what they say. They are for petsc4py; in C the calls have the same names.",
    "",
    "Mind",
    "",
    "  Memory and time come from an estimate, which is no guarantee. A job past its memory can take a shared node down: keep --mem.",
    "  A converged linear solve says nothing about whether the model or the mesh is right.",
    "",
  ].join("\n");
}

function noteOf(strategy: string, file: BenchPack["candidates"][number]["file"]): string {
  if (file.kind === "recipe-only") return `; recipe only, not run: see recipes/${strategy}.txt`;
  return file.callingLines === null ? "" : `; needs calling-lines/${strategy}.py`;
}
