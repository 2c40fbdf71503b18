import { defaultRates, type Machine } from "./machine";
import type { Questionnaire } from "./questionnaire-schema";

/** Hardware as the estimates see it: cores over all nodes used, the rates of the sheet or the defaults. */
export type Hardware = {
  cores: number;
  nodes: number;
  coresPerNode: number;
  memoryPerNodeGiB: number;
  bandwidthPerNodeGBps: number;
  gflopsPerCore: number;
  networkLatencyMicroseconds: number;
  networkBandwidthGBps: number;
  timeLimitSeconds: number | null;
  machineName: string | null;
};

/** A valid questionnaire with its hardware resolved: what every later stage works from. */
export type Answers = Omit<Questionnaire, "hardware" | "title"> & { hardware: Hardware };

/**
 * Resolve the hardware of a questionnaire. `machine` is the sheet named by `hardware.machineId`, else null.
 * Throws RangeError when the questionnaire names a sheet and none is given, or asks for more cores than the sheet has.
 */
export function toAnswers(questionnaire: Questionnaire, machine: Machine | null): Answers {
  const { hardware, title: _title, ...rest } = questionnaire;
  const contrast = rest.contrast.ratio > 1 && rest.contrast.pattern === "constant" ? { ...rest.contrast, pattern: "blocks" as const } : rest.contrast;
  return { ...rest, contrast, hardware: hardware.machineId === undefined ? typedHardware(hardware) : sheetHardware(hardware, machine) };
}

function typedHardware({ cores, nodes = 1, memoryPerNodeGiB, timeLimitSeconds }: Questionnaire["hardware"]): Hardware {
  if (memoryPerNodeGiB === undefined) throw new RangeError("Memory per node is missing.");
  return { ...defaultRates, cores, nodes, memoryPerNodeGiB, timeLimitSeconds, coresPerNode: Math.ceil(cores / nodes), machineName: null };
}

function sheetHardware({ cores, timeLimitSeconds }: Questionnaire["hardware"], machine: Machine | null): Hardware {
  if (!machine) throw new RangeError("The questionnaire names a machine sheet that was not given.");
  const { name, nodes: available, ...rates } = machine;
  const nodes = Math.ceil(cores / machine.coresPerNode);
  if (nodes > available) throw new RangeError("More cores than the machine sheet has.");
  return { ...rates, cores, nodes, timeLimitSeconds, machineName: name };
}
