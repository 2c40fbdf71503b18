import type { CostKit, CostStep, IterationTraffic } from "./cost";

/** Seconds of one Krylov iteration with its preconditioner, and the step that explains them. */
export function iterationCost(kit: CostKit, traffic: IterationTraffic, preconditioner: { name: string; seconds: number }): { seconds: number; why: CostStep } {
  const seconds = kit.iterationSeconds(traffic) + preconditioner.seconds;
  return {
    seconds,
    why: {
      quantity: "Time of one iteration",
      formula: "(12 bytes x nonzeros + 8 bytes x unknowns x vectors) / bandwidth + reductions + preconditioner",
      inputs: [
        { name: "nonzeros applied", value: traffic.nonzeros, unit: "" },
        { name: "unknowns", value: traffic.unknowns, unit: "" },
        { name: "vectors moved", value: traffic.vectors, unit: "" },
        { name: "reductions", value: traffic.reductions, unit: "" },
        { name: preconditioner.name, value: preconditioner.seconds, unit: "s" },
      ],
      value: seconds,
      unit: "s",
      source: "Bandwidth and latency of the machine; gain of data in cache fitted to reference runs",
    },
  };
}
