import type { Machine } from "@/lib/questionnaire/machine";

/**
 * The machine of the reference runs: two virtual cores of a shared server. Rates are those that the runs show: the flop rate of large fronts, the
 * bandwidth of one core in matrix products.
 */
export const measuringMachine: Machine = {
  name: "Machine of the reference runs",
  coresPerNode: 2,
  nodes: 1,
  memoryPerNodeGiB: 24,
  bandwidthPerNodeGBps: 20,
  gflopsPerCore: 13,
  networkLatencyMicroseconds: 1,
  networkBandwidthGBps: 10,
};
