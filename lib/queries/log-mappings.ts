import { queryOptions } from "@tanstack/react-query";
import type { LogMappingView } from "@/lib/api/contract/logs";
import { callApi } from "./call-api";

export const logMappingKeys = { all: ["log-mappings"] as const };

/** The team's own log formats; a team has few. */
export function logMappingsQuery() {
  return queryOptions({
    queryKey: logMappingKeys.all,
    queryFn: async ({ signal }) => (await callApi<{ items: LogMappingView[] }>("/log-mappings?limit=200", { signal })).items,
    staleTime: 60_000,
  });
}
