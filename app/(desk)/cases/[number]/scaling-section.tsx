"use client";

import { useQuery } from "@tanstack/react-query";
import { useState } from "react";
import { LogLogLines } from "@/components/charts/log-log-lines";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SegmentedControl } from "@/components/ui/segmented-control";
import { Skeleton } from "@/components/ui/skeleton";
import type { CurveAxis } from "@/lib/api/contract/cases";
import { problemText } from "@/lib/queries/call-api";
import { scalingCurvesQuery } from "@/lib/queries/cases";
import { strategyNames } from "@/lib/strategies/strategy-names";

/** How the leading strategies would fare on more cores, or on larger and smaller meshes. */
export function ScalingSection({ reference, adviceId }: { reference: string; adviceId: string }) {
  const [over, setOver] = useState<CurveAxis>("cores");
  const curves = useQuery(scalingCurvesQuery(reference, adviceId, over));
  return (
    <section aria-labelledby="scaling" className="grid grid-cols-1 gap-3">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <h2 id="scaling" className="text-lg font-semibold">Scaling</h2>
        <SegmentedControl className="print:hidden" legend="Predicted time against" legendHidden value={over} onValueChange={setOver} options={[{ value: "cores", label: "Cores" }, { value: "unknowns", label: "Unknowns" }]} />
      </div>
      <p className="text-sm text-faint">By the model alone, before rules and evidence. {over === "cores" ? "More cores stop helping where a factorisation tree, a coarse grid or the network holds them up." : "The machine stays as it is; the mesh is refined or coarsened."}</p>
      {curves.error ? (
        <Notice tone="bad" title="The curves could not be fetched" action={<Button size="small" onClick={() => void curves.refetch()}>Try again</Button>}>{problemText(curves.error)}</Notice>
      ) : curves.data === undefined ? (
        <Skeleton className="h-72 print:hidden" />
      ) : (
        <LogLogLines
          title={`Predicted time against ${curves.data.over}`}
          xLabel={curves.data.over}
          yLabel="total time"
          xUnit="count"
          yUnit="seconds"
          series={curves.data.curves.map((curve) => ({ id: curve.strategy, label: strategyNames[curve.strategy], points: curve.points }))}
        />
      )}
    </section>
  );
}
