import { queryOptions } from "@tanstack/react-query";
import type { MachineView } from "@/lib/api/contract/machines";
import { callApi } from "./call-api";

export const machineKeys = { all: ["machines"] as const };

/** All machine sheets of the team; a team has few. */
export function machinesQuery() {
  return queryOptions({
    queryKey: machineKeys.all,
    queryFn: async ({ signal }) => (await callApi<{ items: MachineView[] }>("/machines?limit=200", { signal })).items,
    staleTime: 60_000,
  });
}
