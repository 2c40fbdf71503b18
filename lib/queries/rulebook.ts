import { keepPreviousData, queryOptions } from "@tanstack/react-query";
import type { DraftView, TrialView } from "@/lib/api/contract/drafts";
import type { ReplaySummary, ReplayView, SearchSummary, SearchView, WorkStatus } from "@/lib/api/contract/refinement";
import type { RuleDifference } from "@/lib/refinement/diff-rule-sets";
import { callApi } from "./call-api";

export const rulebookKeys = {
  all: ["rulebook"] as const,
  draft: (id: string) => ["rulebook", "draft", id] as const,
  replays: (draftId: string) => ["rulebook", "replays", draftId] as const,
  replay: (draftId: string, id: string) => ["rulebook", "replays", draftId, id] as const,
  searches: ["rulebook", "searches"] as const,
  search: (id: string) => ["rulebook", "searches", id] as const,
};

const askAgainMilliseconds = 1000;

/** Background work is asked for again until it has ended. */
function whileUnderWay(status: WorkStatus | undefined): number | false {
  return status === "queued" || status === "running" ? askAgainMilliseconds : false;
}

export function draftQuery(id: string) {
  return queryOptions({ queryKey: rulebookKeys.draft(id), queryFn: ({ signal }) => callApi<DraftView>(`/rulebook/drafts/${id}`, { signal }), staleTime: 10_000 });
}

export function replaysQuery(draftId: string) {
  return queryOptions({
    queryKey: rulebookKeys.replays(draftId),
    queryFn: async ({ signal }) => (await callApi<{ items: ReplaySummary[] }>(`/rulebook/drafts/${draftId}/replays`, { signal })).items,
    staleTime: 5_000,
  });
}

/** One replay, asked for again each second while it is under way. */
export function replayQuery(draftId: string, id: string) {
  return queryOptions({
    queryKey: rulebookKeys.replay(draftId, id),
    queryFn: ({ signal }) => callApi<ReplayView>(`/rulebook/drafts/${draftId}/replays/${id}`, { signal }),
    staleTime: 500,
    refetchInterval: ({ state }) => whileUnderWay(state.data?.status),
  });
}

export function searchesQuery() {
  return queryOptions({
    queryKey: rulebookKeys.searches,
    queryFn: async ({ signal }) => (await callApi<{ items: SearchSummary[] }>("/rulebook/proposals", { signal })).items,
    staleTime: 5_000,
  });
}

export function searchQuery(id: string) {
  return queryOptions({
    queryKey: rulebookKeys.search(id),
    queryFn: ({ signal }) => callApi<SearchView>(`/rulebook/proposals/${id}`, { signal }),
    staleTime: 500,
    refetchInterval: ({ state }) => whileUnderWay(state.data?.status),
  });
}

/** What rules in the making say about a case; "" for no case chosen. */
export function trialQuery(caseNumber: string, rules: DraftView["rules"], enabled: boolean) {
  return queryOptions({
    queryKey: ["rulebook", "trial", caseNumber, rules] as const,
    queryFn: ({ signal }) => callApi<TrialView>("/rulebook/try", { method: "POST", body: { case: caseNumber, rules }, signal }),
    enabled: enabled && caseNumber !== "",
    placeholderData: keepPreviousData,
    staleTime: 60_000,
    gcTime: 10_000,
    retry: false,
  });
}

/** What an edition changed in the one before it. */
export function changesQuery(number: number) {
  return queryOptions({
    queryKey: ["rulebook", "changes", number] as const,
    queryFn: ({ signal }) => callApi<{ number: number; before: number | null; differences: RuleDifference[] }>(`/rulebook/editions/${number}/changes`, { signal }),
    staleTime: Infinity,
  });
}
