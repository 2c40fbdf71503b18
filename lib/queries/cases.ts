import { infiniteQueryOptions, keepPreviousData, queryOptions } from "@tanstack/react-query";
import type { Advice } from "@/lib/advice/advice";
import type { CaseDetail, CaseSummary, CurveAxis, ScalingCurves, StrategyFiles } from "@/lib/api/contract/cases";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import { callApi, searchString } from "./call-api";

export const caseKeys = {
  all: ["cases"] as const,
  list: (filter: Readonly<Record<string, string>>) => ["cases", "list", filter] as const,
  detail: (reference: string) => ["cases", "detail", reference] as const,
  files: (reference: string, adviceId: string, strategy: string) => ["case-files", reference, adviceId, strategy] as const,
  curves: (reference: string, adviceId: string, over: string) => ["case-curves", reference, adviceId, over] as const,
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

/** Options, recipe and batch script of one strategy under one advice. */
export function strategyFilesQuery(reference: string, adviceId: string, strategy: StrategyId) {
  return queryOptions({
    queryKey: caseKeys.files(reference, adviceId, strategy),
    queryFn: ({ signal }) => callApi<StrategyFiles>(`/cases/${reference}/strategies/${strategy}`, { signal }),
    staleTime: 5 * 60_000,
  });
}

/** How the leading strategies of one advice scale. */
export function scalingCurvesQuery(reference: string, adviceId: string, over: CurveAxis) {
  return queryOptions({
    queryKey: caseKeys.curves(reference, adviceId, over),
    queryFn: ({ signal }) => callApi<ScalingCurves>(`/cases/${reference}/curves?over=${over}`, { signal }),
    placeholderData: keepPreviousData,
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
