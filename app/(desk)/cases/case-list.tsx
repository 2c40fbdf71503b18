"use client";

import { useInfiniteQuery } from "@tanstack/react-query";
import { Download, Plus } from "lucide-react";
import Link from "next/link";
import { useCallback, useMemo } from "react";
import { CaseFilters } from "@/components/cases/case-filters";
import { CaseTable } from "@/components/cases/case-table";
import { EmptyState } from "@/components/layout/empty-state";
import { PageTitle } from "@/components/layout/page-title";
import { Sheet } from "@/components/layout/sheet";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import { problemText, searchString } from "@/lib/queries/call-api";
import { casesQuery } from "@/lib/queries/cases";
import { useAddressFilter } from "../use-address-filter";

type CaseListProps = { mayWrite: boolean; authors: readonly { id: string; name: string }[] };

/** Filters that the hit rates set; shown as words because the form has no field for them. */
const drillDowns = ["result", "month", "rule", "advised", "edition", "from", "to"] as const;
const known = ["q", "status", "strategy", "author", "discretisation", "meshFamily", "degree", "sort", ...drillDowns] as const;

export function CaseList({ mayWrite, authors }: CaseListProps) {
  const [filter, change] = useAddressFilter(known);
  const { sort = "-number", ...narrowing } = filter;
  const query = useInfiniteQuery(casesQuery(filter));
  const cases = useMemo(() => query.data?.pages.flatMap((page) => page.items) ?? [], [query.data]);
  const clear = useCallback(() => change(Object.fromEntries(known.map((name) => [name, ""]))), [change]);
  const filtered = Object.keys(narrowing).length > 0;
  return (
    <Sheet>
      <PageTitle
        title="Cases"
        below="Every set-up the team has described, with the strategy advised first and what came of it."
        actions={
          <>
            <Button asChild><a href={`/api/v1/cases/export.csv${searchString(filter)}`} download><Download aria-hidden /> Export CSV</a></Button>
            {mayWrite && <Button asChild variant="main"><Link href="/cases/new"><Plus aria-hidden /> New case</Link></Button>}
          </>
        }
      />
      <CaseFilters filter={filter} authors={authors} onChange={change} onClear={clear} />
      <DrillDowns filter={filter} onRemove={(name) => change({ [name]: "" })} />
      {query.error !== null ? (
        <Notice tone="bad" title="The cases could not be fetched" action={<Button size="small" onClick={() => void query.refetch()}>Try again</Button>}>{problemText(query.error)}</Notice>
      ) : query.data === undefined ? (
        <div className="grid gap-2" aria-label="Loading the cases" role="status">{[0, 1, 2, 3, 4, 5].map((row) => <Skeleton key={row} className="h-10" />)}</div>
      ) : cases.length === 0 ? (
        filtered ? (
          <EmptyState title="No case fits these filters" text="Loosen a filter, or clear them all." action={<Button onClick={clear}>Clear the filters</Button>} />
        ) : (
          <EmptyState
            title="No case yet"
            text="Describe the system you are about to solve; the advice comes with the first answers."
            action={mayWrite ? <Button asChild variant="main"><Link href="/cases/new">Describe a case</Link></Button> : undefined}
          />
        )
      ) : (
        <div className={query.isPlaceholderData ? "opacity-60" : ""} aria-busy={query.isFetching}>
          <CaseTable cases={cases} sort={sort} onSort={(next) => change({ sort: next })} />
          <div className="flex items-center justify-between gap-4 pt-4">
            <p className="text-sm text-faint" role="status">{cases.length} {cases.length === 1 ? "case" : "cases"} shown{query.hasNextPage ? ", more to come" : ""}</p>
            {query.hasNextPage && <Button onClick={() => void query.fetchNextPage()} disabled={query.isFetchingNextPage}>{query.isFetchingNextPage ? "Loading" : "Show more"}</Button>}
          </div>
        </div>
      )}
    </Sheet>
  );
}

function DrillDowns({ filter, onRemove }: { filter: Readonly<Record<string, string>>; onRemove: (name: string) => void }) {
  const set = drillDowns.filter((name) => filter[name] !== undefined);
  if (set.length === 0) return null;
  return (
    <p className="flex flex-wrap items-center gap-2 text-sm">
      <span className="text-faint">From the hit rates:</span>
      {set.map((name) => (
        <Badge key={name} tone="water">
          {name} {filter[name]}
          <button type="button" className="ml-1 underline" aria-label={`Remove the filter ${name}`} onClick={() => onRemove(name)}>remove</button>
        </Badge>
      ))}
    </p>
  );
}
