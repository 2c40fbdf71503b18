"use client";

import { useQuery } from "@tanstack/react-query";
import { RunHistory } from "@/components/runs/run-history";
import { Dialog, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { RunView } from "@/lib/api/contract/runs";
import { problemText } from "@/lib/queries/call-api";
import { runQuery } from "@/lib/queries/runs";

/** What a run said before it was corrected. */
export function FormerValues({ run, onDone }: { run: RunView; onDone: () => void }) {
  const { data, error } = useQuery(runQuery(run.id, run.revision));
  return (
    <Dialog open onOpenChange={(open) => !open && onDone()}>
      <DialogContent className="max-w-3xl">
        <DialogTitle>Former values</DialogTitle>
        <DialogDescription>What the run said before each correction, the latest last.</DialogDescription>
        {error !== null ? <Notice tone="bad">{problemText(error)}</Notice> : data === undefined ? <Skeleton className="h-32" /> : <RunHistory revisions={data.revisions} />}
      </DialogContent>
    </Dialog>
  );
}
