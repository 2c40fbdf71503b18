import { keepPreviousData, queryOptions } from "@tanstack/react-query";
import type { HitRatesResponse } from "@/lib/api/contract/record";
import { callApi, searchString } from "./call-api";

export const hitRateKeys = { all: ["hit-rates"] as const, filtered: (filter: Readonly<Record<string, string>>) => ["hit-rates", filter] as const };

export function hitRatesQuery(filter: Readonly<Record<string, string>>) {
  return queryOptions({
    queryKey: hitRateKeys.filtered(filter),
    queryFn: ({ signal }) => callApi<HitRatesResponse>(`/hit-rates${searchString(filter)}`, { signal }),
    placeholderData: keepPreviousData,
    staleTime: 10_000,
  });
}
