import type { MachineRow } from "@/db/queries/machines";
import type { MachineView } from "@/lib/api/contract/machines";
import type { Machine } from "@/lib/questionnaire/machine";
import { AppError } from "@/lib/shared/app-error";

export function machineView(row: MachineRow): MachineView {
  return { ...row, createdAt: row.createdAt.toISOString() };
}

/** The sheet alone, as the estimates read it. */
export function machineSheet(row: MachineRow): Machine {
  const { name, coresPerNode, nodes, memoryPerNodeGiB, bandwidthPerNodeGBps, gflopsPerCore, networkLatencyMicroseconds, networkBandwidthGBps } = row;
  return { name, coresPerNode, nodes, memoryPerNodeGiB, bandwidthPerNodeGBps, gflopsPerCore, networkLatencyMicroseconds, networkBandwidthGBps };
}

export function machineNotFound(): AppError {
  return new AppError("not-found", "This team has no such machine sheet.");
}

export function nameTaken(name: string): AppError {
  return new AppError("invalid", "The name is taken.", { fields: [{ path: "name", message: `A machine sheet named ${name} is there already.` }] });
}
