import { runnable, type BenchPack } from "./bench-pack";

/** Margins over the high end of the estimate's 80 % range: one run in ten lies above it, and the program itself needs room. */
const memoryMargin = 1.25;
const timeMargin = 1.5;
/** Common practice, no source: what a program and its libraries hold beside the solver, per process; and its start and assembly. */
const processMemoryMiB = 200;
const startSeconds = 300;
/** Longest request written down; a site's own limit is usually shorter. */
const mostSeconds = 14 * 86_400;

export type SlurmRequest = { memoryMiB: number; /** Of all candidates one after the other. */ serialSeconds: number; /** Of the longest one, for an array. */ arraySeconds: number };

/** What a pack asks a cluster for: memory of the largest candidate, never beyond the node's; times within the case's limit each. */
export function slurmRequest(pack: BenchPack): SlurmRequest {
  const { hardware } = pack;
  const candidates = runnable(pack);
  const tasksPerNode = Math.ceil(hardware.cores / hardware.nodes);
  const largestGiB = Math.max(0, ...candidates.map(({ memoryGiBHigh }) => memoryGiBHigh));
  const wantedMiB = Math.ceil((largestGiB * 1024 * memoryMargin) / hardware.nodes + processMemoryMiB * tasksPerNode);
  const seconds = candidates.map(({ totalSecondsHigh }) => candidateSeconds(totalSecondsHigh, hardware.timeLimitSeconds));
  return {
    memoryMiB: Math.min(wantedMiB, Math.floor(hardware.memoryPerNodeGiB * 1024)),
    serialSeconds: Math.min(mostSeconds, seconds.reduce((sum, one) => sum + one, 0)),
    arraySeconds: Math.min(mostSeconds, Math.max(60, ...seconds)),
  };
}

function candidateSeconds(high: number, limit: number | null): number {
  const wanted = Math.ceil(high * timeMargin) + startSeconds;
  return limit === null ? wanted : Math.min(wanted, Math.ceil(limit) + startSeconds);
}

/** Slurm's days-hours:minutes:seconds, rounded up to a minute. */
export function slurmTime(seconds: number): string {
  const minutes = Math.max(1, Math.ceil(seconds / 60));
  const clock = [Math.floor(minutes / 60) % 24, minutes % 60, 0].map((part) => String(part).padStart(2, "0")).join(":");
  const days = Math.floor(minutes / 1440);
  return days > 0 ? `${days}-${clock}` : clock;
}
