"use client";

import { useQuery } from "@tanstack/react-query";
import { CodeBlock } from "@/components/ui/code-block";
import { Notice } from "@/components/ui/notice";
import { Button } from "@/components/ui/button";
import { Skeleton } from "@/components/ui/skeleton";
import { problemText } from "@/lib/queries/call-api";
import { strategyFileQuery } from "@/lib/queries/cases";
import type { StrategyId } from "@/lib/shared/strategy-ids";

type OptionsPanelProps = { reference: string; adviceId: string; strategy: StrategyId };

/** The options file, the recipe and the batch script of one strategy, fetched when the panel is shown. */
export function OptionsPanel({ reference, adviceId, strategy }: OptionsPanelProps) {
  return (
    <div className="grid gap-4">
      <FileView reference={reference} adviceId={adviceId} strategy={strategy} kind="options" title={`${strategy}.options`} fileName={`saddlemark-case-${reference}-${strategy}.options`} />
      <FileView reference={reference} adviceId={adviceId} strategy={strategy} kind="batch-script" title={`${strategy}.sh`} fileName={`saddlemark-case-${reference}-${strategy}.sh`} />
    </div>
  );
}

type FileViewProps = OptionsPanelProps & { kind: "options" | "batch-script"; title: string; fileName: string };

function FileView({ reference, adviceId, strategy, kind, title, fileName }: FileViewProps) {
  const file = useQuery(strategyFileQuery(reference, adviceId, kind, strategy));
  if (file.error) {
    return (
      <Notice tone="bad" title="The file could not be fetched" action={<Button size="small" onClick={() => void file.refetch()}>Try again</Button>}>
        {problemText(file.error)}
      </Notice>
    );
  }
  return file.data === undefined ? <Skeleton className="h-40" /> : <CodeBlock title={title} code={file.data} fileName={fileName} />;
}
