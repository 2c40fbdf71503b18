"use client";

import { BatchSnippet } from "@/components/logs/batch-snippet";
import { Dialog, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";

/** How a job script reports by itself. Opened by a click, so the address of the page is known. */
export function LogSnippet({ caseNumber, onDone }: { caseNumber: number; onDone: () => void }) {
  return (
    <Dialog open onOpenChange={(open) => !open && onDone()}>
      <DialogContent className="max-w-3xl">
        <DialogTitle>Report from the batch job</DialogTitle>
        <DialogDescription>The run reaches the record from where it happened.</DialogDescription>
        <BatchSnippet origin={window.location.origin} caseNumber={caseNumber} />
      </DialogContent>
    </Dialog>
  );
}
