import { memoryPerNodeMiB, startSeconds, timeMargin } from "@/lib/strategies/slurm";
import { runnable, type BenchPack } from "./bench-pack";

export { slurmTime } from "@/lib/strategies/slurm";

/** Longest request written down; a site's own limit is usually shorter. */
const mostSeconds = 14 * 86_400;

export type SlurmRequest = { memoryMiB: number; /** Of all candidates one after the other. */ serialSeconds: number; /** Of the longest one, for an array. */ arraySeconds: number };

/** What a pack asks a cluster for: memory of the largest candidate, never beyond the node's; times within the case's limit each. */
export function slurmRequest(pack: BenchPack): SlurmRequest {
  const { hardware } = pack;
  const candidates = runnable(pack);
  const largestGiB = Math.max(0, ...candidates.map(({ memoryGiBHigh }) => memoryGiBHigh));
  const wantedMiB = memoryPerNodeMiB(largestGiB, hardware);
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
