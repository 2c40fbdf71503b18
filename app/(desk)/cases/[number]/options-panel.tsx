"use client";

import { useQuery } from "@tanstack/react-query";
import { StrategyFilesView } from "@/components/advice/strategy-files-view";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import { problemText } from "@/lib/queries/call-api";
import { strategyFilesQuery } from "@/lib/queries/cases";
import type { StrategyId } from "@/lib/shared/strategy-ids";

type OptionsPanelProps = { reference: string; adviceId: string; strategy: StrategyId };

/** Options, recipe and batch script of one strategy, fetched when the panel is shown. */
export function OptionsPanel({ reference, adviceId, strategy }: OptionsPanelProps) {
  const files = useQuery(strategyFilesQuery(reference, adviceId, strategy));
  if (files.error) {
    return (
      <Notice tone="bad" title="The files could not be fetched" action={<Button size="small" onClick={() => void files.refetch()}>Try again</Button>}>
        {problemText(files.error)}
      </Notice>
    );
  }
  return files.data === undefined ? <Skeleton className="h-40" /> : <StrategyFilesView files={files.data} prefix={`case-${reference}-`} />;
}
