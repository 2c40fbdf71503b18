import { infiniteQueryOptions, keepPreviousData, queryOptions } from "@tanstack/react-query";
import type { Advice } from "@/lib/advice/advice";
import type { CaseDetail, CaseSummary } from "@/lib/api/contract/cases";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { callApi, callApiForText, searchString } from "./call-api";

export const caseKeys = {
  all: ["cases"] as const,
  list: (filter: Readonly<Record<string, string>>) => ["cases", "list", filter] as const,
  detail: (reference: string) => ["cases", "detail", reference] as const,
  file: (reference: string, adviceId: string, kind: string, strategy: string) => ["cases", "detail", reference, kind, adviceId, strategy] as const,
};

/** Cases of one filter, page after page. Filter names and values as they stand in the address of /cases. */
export function casesQuery(filter: Readonly<Record<string, string>>) {
  return infiniteQueryOptions({
    queryKey: caseKeys.list(filter),
    queryFn: ({ pageParam, signal }) =>
      callApi<{ items: CaseSummary[]; nextCursor: string | null }>(`/cases${searchString({ ...filter, limit: 50, cursor: pageParam })}`, { signal }),
    initialPageParam: "",
    getNextPageParam: (page) => page.nextCursor ?? undefined,
    placeholderData: keepPreviousData,
    staleTime: 10_000,
  });
}

export function caseQuery(reference: string) {
  return queryOptions({
    queryKey: caseKeys.detail(reference),
    queryFn: ({ signal }) => callApi<CaseDetail>(`/cases/${reference}`, { signal }),
    staleTime: 10_000,
  });
}

/** The options file or the batch script of one strategy, as text. */
export function strategyFileQuery(reference: string, adviceId: string, kind: "options" | "batch-script", strategy: StrategyId) {
  return queryOptions({
    queryKey: caseKeys.file(reference, adviceId, kind, strategy),
    queryFn: ({ signal }) => callApiForText(`/cases/${reference}/${kind}/${strategy}`, { signal }),
    staleTime: 5 * 60_000,
  });
}

/** Advice on answers that are not saved; `questionnaire` null while they can't be used. */
export function provisionalAdviceQuery(questionnaire: Questionnaire | null) {
  return queryOptions({
    queryKey: ["advice", questionnaire] as const,
    queryFn: ({ signal }) => callApi<Advice>("/advice", { method: "POST", body: questionnaire, signal }),
    enabled: questionnaire !== null,
    placeholderData: keepPreviousData,
    staleTime: 60_000,
    gcTime: 60_000,
  });
}
