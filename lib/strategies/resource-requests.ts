import { memoryMargin, memoryPerNodeMiB, processMemoryMiB, slurmTime, startSeconds, timeMargin } from "./slurm";
import type { OptionsContext } from "./strategy";

/** What a job is asked from: the case and the high ends of its estimate. Seconds are wall seconds of the solves, null if unknown. */
export type RequestContext = OptionsContext & { totalSecondsHigh?: number | null };

const unknownSeconds = 3600;

/** Slurm's directives for memory and time, each under a comment that says how it was reached. */
export function resourceRequests(context: RequestContext): string[] {
  const memory = memoryRequest(context);
  const time = timeRequest(context);
  return [`# ${memory.reason}`, `#SBATCH --mem=${memory.mib}M`, `# ${time.reason}`, `#SBATCH --time=${slurmTime(time.seconds)}`];
}

/** MiB per node and how it was reached. */
function memoryRequest({ answers, memoryGiBHigh }: RequestContext): { mib: number; reason: string } {
  const { nodes, memoryPerNodeGiB } = answers.hardware;
  const wanted = memoryPerNodeMiB(memoryGiBHigh, answers.hardware);
  const available = Math.floor(memoryPerNodeGiB * 1024);
  const reached = `${plain(memoryGiBHigh)} GiB over ${nodes} node(s), the estimate's high end, times ${memoryMargin}, plus ${processMemoryMiB} MiB a process`;
  if (wanted <= available) return { mib: wanted, reason: `Memory per node: ${reached}.` };
  return { mib: available, reason: `Memory per node: all it has. ${reached} would be ${wanted} MiB: expect it to run out; take more nodes.` };
}

/** Seconds of the job and how they were reached. */
function timeRequest({ answers, totalSecondsHigh }: RequestContext): { seconds: number; reason: string } {
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
