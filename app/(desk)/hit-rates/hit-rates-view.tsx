"use client";

import { useQuery } from "@tanstack/react-query";
import { Printer } from "lucide-react";
import Link from "next/link";
import type { ReactNode } from "react";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { TimeSeries } from "@/components/charts/time-series";
import { DefinitionList } from "@/components/hit-rates/definition-list";
import { FamilyDegreeTable } from "@/components/hit-rates/family-degree-table";
import { GroupTable } from "@/components/hit-rates/group-table";
import { HeadlineFigures } from "@/components/hit-rates/headline-figures";
import { RateFilters } from "@/components/hit-rates/rate-filters";
import { EmptyState } from "@/components/layout/empty-state";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginSection, Sheet } from "@/components/layout/sheet";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { HitRatesResponse } from "@/lib/api/contract/record";
import type { HitRateGroup } from "@/lib/hit-rates/hit-rates";
import { problemText, searchString } from "@/lib/queries/call-api";
import { hitRatesQuery } from "@/lib/queries/hit-rates";
import { useAddressFilter } from "../use-address-filter";
import { monthEnd } from "./month-end";

const names = ["discretisation", "meshFamily", "degree", "advised", "edition", "from", "to"] as const;

/** Whether the advice is right, where it is not, and whether it is getting better. */
export function HitRatesView() {
  const [filter, change] = useAddressFilter(names);
  const { data, error, refetch, isPlaceholderData } = useQuery(hitRatesQuery(filter));
  return (
    <Sheet margin={data && <Margin label="Definitions"><MarginSection title="Definitions"><DefinitionList definitions={data.definitions} /></MarginSection></Margin>}>
      <PageTitle
        title="Hit rates"
        below="The team's advice against what its runs measured. Every figure opens the cases behind it."
        actions={<Button variant="quiet" onClick={() => window.print()}><Printer aria-hidden /> Print</Button>}
      />
      <RateFilters filter={filter} onChange={change} onClear={() => change(Object.fromEntries(names.map((name) => [name, ""])))} />
      {error !== null ? (
        <Notice tone="bad" title="The hit rates could not be fetched" action={<Button size="small" onClick={() => void refetch()}>Try again</Button>}>{problemText(error)}</Notice>
      ) : data === undefined ? (
        <div role="status" aria-label="Loading the hit rates" className="grid gap-4"><Skeleton className="h-28" /><Skeleton className="h-56" /></div>
      ) : data.cases === 0 ? (
        <NothingYet filtered={Object.keys(filter).length > 0} onClear={() => change(Object.fromEntries(names.map((name) => [name, ""])))} />
      ) : (
        <div className={isPlaceholderData ? "grid grid-cols-1 gap-10 opacity-60" : "grid grid-cols-1 gap-10"}>
          <Figures data={data} />
        </div>
      )}
    </Sheet>
  );
}

function NothingYet({ filtered, onClear }: { filtered: boolean; onClear: () => void }) {
  return filtered ? (
    <EmptyState title="No case fits these filters" text="Loosen a filter, or clear them all." action={<Button onClick={onClear}>Clear the filters</Button>} />
  ) : (
    <EmptyState title="No hit rate without runs" text="Describe a case, run the strategy advised first, and report what happened. A second strategy on the same case makes it contested." action={<Button asChild variant="main"><Link href="/cases">Go to the cases</Link></Button>} />
  );
}

function Figures({ data }: { data: HitRatesResponse }) {
  const by = (grouping: HitRateGroup["by"]) => data.groups.filter((group) => group.by === grouping);
  const months = by("month").map((group) => ({ at: monthEnd(group.key), ...group.worked }));
  return (
    <>
      <HeadlineFigures rates={data} casesWith={(result) => casesAddress({ ...data.filter, result })} />
      <Block title="Over time">
        <TimeSeries title="Worked, by month" points={months} />
        <GroupTable label="Month" groups={by("month")} nameOf={(group) => group.label} casesOf={casesOf} />
      </Block>
      <Block title="By mesh family and degree">
        <FamilyDegreeTable groups={by("mesh-degree")} casesOf={casesOf} />
      </Block>
      <Block title="By strategy advised first">
        <GroupTable label="Strategy" groups={by("strategy")} nameOf={(group) => <StrategyLabel strategy={group.key} />} casesOf={casesOf} />
      </Block>
      <Block title="By edition">
        <GroupTable label="Edition" groups={by("edition")} nameOf={(group) => <Link href={`/rulebook?edition=${group.key}`} className="prose-link">{group.label}</Link>} casesOf={casesOf} />
      </Block>
      <Block title="By rule">
        <GroupTable label="Rule" groups={by("rule")} nameOf={(group) => <Link href={`/rulebook#${group.key}`} className="prose-link">{group.label}</Link>} casesOf={casesOf} />
      </Block>
    </>
  );
}

function Block({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section aria-label={title} className="grid grid-cols-1 gap-4">
      <h2 className="border-b border-contour pb-1 text-lg font-semibold">{title}</h2>
      {children}
    </section>
  );
}

function casesOf(group: HitRateGroup, result?: string): string {
  return casesAddress({ ...group.filter, ...(result === undefined ? {} : { result }) });
}

function casesAddress(filter: Readonly<Record<string, string | number | undefined>>): string {
  return `/cases${searchString(filter)}`;
}
