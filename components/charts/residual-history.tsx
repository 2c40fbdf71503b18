"use client";

import dynamic from "next/dynamic";
import { cn } from "@/components/ui/cn";
import { Skeleton } from "@/components/ui/skeleton";
import { formatCount, formatNumber } from "@/lib/shared/format";
import { ChartTable } from "./chart-table";

export type ResidualPoint = { iteration: number; monitored: number; true: number | null };

type ResidualHistoryProps = { title: string; history: readonly ResidualPoint[]; /** Relative tolerance, drawn as a line. */ tolerance?: number; className?: string };

// The line chart's library is the heaviest of the product; only a page that shows a history loads it.
const ResidualLines = dynamic(() => import("./residual-lines").then((module) => module.ResidualLines), {
  ssr: false,
  loading: () => <Skeleton className="h-full" />,
});

/** Relative residuals against iterations on a log axis: the monitored one, and the true one where the log tells it. */
export function ResidualHistory({ title, history, tolerance, className }: ResidualHistoryProps) {
  if (history.length === 0) return <p className={cn("text-sm text-faint", className)}>{title}: the log holds no residuals.</p>;
  return (
    <figure className={cn("min-w-0", className)}>
      <figcaption className="mb-1 font-semibold">{title}</figcaption>
      <p className="mb-2 text-sm text-faint">Relative residual, log scale, against iterations. Solid: monitored; dashed with squares: true.</p>
      <div role="img" aria-label={historySentence(title, history, tolerance)} className="h-64">
        <ResidualLines history={history} {...(tolerance === undefined ? {} : { tolerance })} />
      </div>
      <ChartTable
        caption={title}
        columns={["Iteration", "Monitored", "True"]}
        rows={history.map((point) => [formatCount(point.iteration), formatNumber(point.monitored), formatNumber(point.true)])}
      />
    </figure>
  );
}

export function historySentence(title: string, history: readonly ResidualPoint[], tolerance: number | undefined): string {
  const [first, last] = [history.at(0), history.at(-1)];
  if (first === undefined || last === undefined) return title;
  const truth = last.true === null ? "" : `, true ${formatNumber(last.true)}`;
  const limit = tolerance === undefined ? "" : `; tolerance ${formatNumber(tolerance)}`;
  return `${title}: from ${formatNumber(first.monitored)} at iteration ${formatCount(first.iteration)} to ${formatNumber(last.monitored)} at iteration ${formatCount(last.iteration)}${truth}${limit}`;
}
