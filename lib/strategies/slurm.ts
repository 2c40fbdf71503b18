/** Margins over the high end of the estimate's 80 % range: one run in ten lies above it, and the program itself needs room. */
export const memoryMargin = 1.25;
export const timeMargin = 1.5;
/** Common practice, no source: what a program and its libraries hold beside the solver, per process; and its start and assembly. */
export const processMemoryMiB = 200;
export const startSeconds = 300;

/** MiB a node for `memoryGiB` over all nodes, with the margin and room for the processes. */
export function memoryPerNodeMiB(memoryGiB: number, hardware: { cores: number; nodes: number }): number {
  const tasksPerNode = Math.ceil(hardware.cores / hardware.nodes);
  return Math.ceil((memoryGiB * 1024 * memoryMargin) / hardware.nodes + processMemoryMiB * tasksPerNode);
}

/** Slurm's days-hours:minutes:seconds, rounded up to a minute. */
export function slurmTime(seconds: number): string {
  const minutes = Math.max(1, Math.ceil(seconds / 60));
  const clock = [Math.floor(minutes / 60) % 24, minutes % 60, 0].map((part) => String(part).padStart(2, "0")).join(":");
  const days = Math.floor(minutes / 1440);
  return days > 0 ? `${days}-${clock}` : clock;
}
