import { queryOptions } from "@tanstack/react-query";
import type { RunLogView } from "@/lib/api/contract/logs";
import type { RunDetailView } from "@/lib/api/contract/runs";
import { callApi } from "./call-api";

/** One run with its diagnosis and former values. */
export function runQuery(id: string, revision: number) {
  return queryOptions({
    queryKey: ["runs", id, revision] as const,
    queryFn: ({ signal }) => callApi<RunDetailView>(`/runs/${id}`, { signal }),
    staleTime: 60_000,
  });
}

/** What was read from a run's log; `enabled` false for a run without one, and until somebody looks. */
export function runLogQuery(id: string, enabled: boolean) {
  return queryOptions({
    queryKey: ["runs", id, "log"] as const,
    queryFn: ({ signal }) => callApi<RunLogView>(`/runs/${id}/log`, { signal }),
    enabled,
    staleTime: 5 * 60_000,
  });
}
