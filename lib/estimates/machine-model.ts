import type { Hardware } from "@/lib/questionnaire/answers";
import type { ModelConstants } from "./constants";

/**
 * The machine as the cost models see it, all in SI units.
 *
 * Bandwidth. One core draws at most b1 (practice); c cores of a node draw (( c b1 )^-4 + B^-4)^(-1/4), a smooth minimum of c b1 and the node's B.
 * Data that stay in cache between iterations are faster: a working set W on caches of C bytes moves at the fraction
 * r + (1 - r) W / (W + C) of the memory's time, r fitted.
 *
 * Messages. One message costs the network's latency between nodes, a constant within a node; a reduction over p processes takes log2 p of them.
 */
export type MachineModel = {
  cores: number;
  nodes: number;
  flopsPerSecondPerCore: number;
  latencySeconds: number;
  networkBytesPerSecond: number;
  cacheBytes: number;
  /** Bytes a second that `cores` of the job's cores draw, spread over its nodes. */
  bandwidth: (cores: number) => number;
  /** Seconds to move `bytes` through all cores once, out of a working set that is revisited. */
  streamSeconds: (bytes: number, workingSetBytes: number) => number;
  reductionSeconds: () => number;
};

export function machineModel(hardware: Hardware, constants: ModelConstants): MachineModel {
  const { cores, nodes } = hardware;
  const nodeBandwidth = hardware.bandwidthPerNodeGBps * 1e9;
  const coreBandwidth = Math.min(constants.singleCoreBandwidthGBps * 1e9, nodeBandwidth);
  const bandwidth = (used: number) => {
    const usedNodes = Math.min(nodes, used);
    return usedNodes * smoothMinimum((used / usedNodes) * coreBandwidth, nodeBandwidth);
  };
  const allBandwidth = bandwidth(cores);
  const cacheBytes = constants.cacheBytesPerCore * cores;
  const latencySeconds = nodes > 1 ? Math.max(hardware.networkLatencyMicroseconds * 1e-6, constants.nodeLatencySeconds) : constants.nodeLatencySeconds;
  const { cacheAdvantage } = constants;
  return {
    cores,
    nodes,
    flopsPerSecondPerCore: hardware.gflopsPerCore * 1e9,
    latencySeconds,
    networkBytesPerSecond: nodes > 1 ? hardware.networkBandwidthGBps * 1e9 * nodes : allBandwidth,
    cacheBytes,
    bandwidth,
    streamSeconds: (bytes, workingSetBytes) =>
      (bytes / allBandwidth) * (cacheAdvantage + ((1 - cacheAdvantage) * workingSetBytes) / (workingSetBytes + cacheBytes)),
    reductionSeconds: () => 2 * latencySeconds * Math.log2(cores),
  };
}

function smoothMinimum(a: number, b: number): number {
  const smaller = Math.min(a, b);
  return smaller / (1 + (smaller / Math.max(a, b)) ** 4) ** 0.25;
}
