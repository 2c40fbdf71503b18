import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { OptionsContext } from "./strategy";

/** What a job is asked from: the case, the strategy, and the high ends of its estimate. Seconds are wall seconds of the solves, null if unknown. */
export type BatchContext = OptionsContext & { strategy?: StrategyId; totalSecondsHigh?: number | null };

/** Margins over the high end of the estimate's 80 % range: one run in ten lies above it, and the program itself needs room. */
const memoryMargin = 1.25;
const timeMargin = 1.5;
/** Common practice, no source: what a program and its libraries hold beside the solver, per process. */
const processMemoryMiB = 200;
const startSeconds = 300;
const unknownSeconds = 3600;

/**
 * A Slurm script for one solve with a strategy's options file: memory and time from the estimate's high end with stated margins, never
 * beyond the node's memory or the case's time limit. The program's name is left to fill in. Deterministic.
 */
export function batchScript(context: BatchContext): string {
  const { hardware } = context.answers;
  const id = context.strategy ?? "case";
  const tasksPerNode = Math.ceil(hardware.cores / hardware.nodes);
  return [
    "#!/bin/bash",
    "# Saddlemark: Slurm batch script for one solve",
    `#SBATCH --job-name=${id}`,
    `#SBATCH --nodes=${hardware.nodes}`,
    `#SBATCH --ntasks=${hardware.cores}`,
    `#SBATCH --ntasks-per-node=${tasksPerNode}`,
    "#SBATCH --cpus-per-task=1",
    ...resourceRequests(context),
    "#SBATCH --output=%x-%j.log",
    "",
    "# The estimate is no guarantee: a job past its memory is killed, and without --mem it can take a shared node down.",
    "set -euo pipefail",
    "# One process a core, so no threads below it.",
    "export OMP_NUM_THREADS=1 OPENBLAS_NUM_THREADS=1 MKL_NUM_THREADS=1",
    'PROGRAM="${PROGRAM:?set PROGRAM to your program, reading PETSc options}"',
    `OPTIONS="\${OPTIONS:-${id}.petsc}"`,
    'srun "$PROGRAM" -options_file "$OPTIONS" -options_left -log_view -memory_view',
    "",
  ].join("\n");
}

/** Slurm's directives for memory and time, each under a comment that says how it was reached. */
export function resourceRequests(context: BatchContext): string[] {
  const { hardware } = context.answers;
  const memory = memoryRequest(context, Math.ceil(hardware.cores / hardware.nodes));
  const time = timeRequest(context);
  return [`# ${memory.reason}`, `#SBATCH --mem=${memory.mib}M`, `# ${time.reason}`, `#SBATCH --time=${clock(time.seconds)}`];
}

/** MiB per node and how it was reached. */
function memoryRequest({ answers, memoryGiBHigh }: BatchContext, tasksPerNode: number): { mib: number; reason: string } {
  const { nodes, memoryPerNodeGiB } = answers.hardware;
  const wanted = Math.ceil((memoryGiBHigh * 1024 * memoryMargin) / nodes + processMemoryMiB * tasksPerNode);
  const available = Math.floor(memoryPerNodeGiB * 1024);
  const reached = `${plain(memoryGiBHigh)} GiB over ${nodes} node(s), the estimate's high end, times ${memoryMargin}, plus ${processMemoryMiB} MiB a process`;
  if (wanted <= available) return { mib: wanted, reason: `Memory per node: ${reached}.` };
  return { mib: available, reason: `Memory per node: all it has. ${reached} would be ${wanted} MiB: expect it to run out; take more nodes.` };
}

/** Seconds of the job and how they were reached. */
function timeRequest({ answers, totalSecondsHigh }: BatchContext): { seconds: number; reason: string } {
  const limit = answers.hardware.timeLimitSeconds;
  const known = totalSecondsHigh !== undefined && totalSecondsHigh !== null;
  if (!known) {
    if (limit !== null) return { seconds: Math.ceil(limit), reason: "Time: the case's limit." };
    return { seconds: unknownSeconds, reason: "Time: one hour, for want of an estimate." };
  }
  const wanted = Math.ceil(totalSecondsHigh * timeMargin + startSeconds);
  const reached = `${plain(totalSecondsHigh)} s, the estimate's high end, times ${timeMargin}, plus ${startSeconds} s for start and assembly`;
  if (limit === null || wanted <= limit) return { seconds: wanted, reason: `Time: ${reached}.` };
  return { seconds: Math.ceil(limit), reason: `Time: the case's limit. ${reached} would be ${wanted} s.` };
}

function plain(value: number): string {
  return String(Number(value.toPrecision(3)));
}

/** Slurm's days-hours:minutes:seconds, rounded up to a minute. */
function clock(seconds: number): string {
  const minutes = Math.max(1, Math.ceil(seconds / 60));
  const parts = [Math.floor(minutes / 60) % 24, minutes % 60, 0].map((part) => String(part).padStart(2, "0"));
  const days = Math.floor(minutes / 1440);
  return `${days > 0 ? `${days}-` : ""}${parts.join(":")}`;
}
