import { z } from "zod";

/** A machine sheet: rates are per node unless their name says core. */
export const machineSchema = z.strictObject({
  name: z.string().trim().min(1, "Give the machine a name.").max(80),
  coresPerNode: z.int().min(1, "A node has at least 1 core.").max(4096),
  nodes: z.int().min(1, "A machine has at least 1 node.").max(100_000),
  memoryPerNodeGiB: z.number().gt(0, "Memory per node must be greater than 0.").max(1e6),
  /** Sustained memory bandwidth of a node with all its cores busy, GB/s (10^9 bytes). */
  bandwidthPerNodeGBps: z.number().gt(0, "Bandwidth must be greater than 0.").max(1e5),
  /** Sustained dense double-precision rate of one core, Gflop/s. */
  gflopsPerCore: z.number().gt(0, "The flop rate must be greater than 0.").max(1e4),
  /** One small message between nodes, microseconds. */
  networkLatencyMicroseconds: z.number().min(0).max(1e5),
  /** Bandwidth of a node's network link, GB/s. */
  networkBandwidthGBps: z.number().gt(0, "Network bandwidth must be greater than 0.").max(1e5),
});
export type Machine = z.infer<typeof machineSchema>;

/** Rates of a plain two-socket server of the trade; common practice, no source. Used when hardware is typed in by hand. */
export const defaultRates = {
  bandwidthPerNodeGBps: 160,
  gflopsPerCore: 12,
  networkLatencyMicroseconds: 2,
  networkBandwidthGBps: 12,
} as const;
