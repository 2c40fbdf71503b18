import { queryOptions } from "@tanstack/react-query";
import type { RevisionView, RunView } from "@/lib/api/contract/runs";
import { callApi } from "./call-api";

/** One run with its former values. */
export function runQuery(id: string, revision: number) {
  return queryOptions({
    queryKey: ["runs", id, revision] as const,
    queryFn: ({ signal }) => callApi<RunView & { revisions: RevisionView[] }>(`/runs/${id}`, { signal }),
    staleTime: 60_000,
  });
}
