"use client";

import { Download } from "lucide-react";
import { useState } from "react";
import { CandidateChoice } from "@/components/bench-pack/candidate-choice";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";
import type { CaseDetail } from "@/lib/api/contract/cases";
import type { StrategyId } from "@/lib/shared/strategy-ids";

/** As many as fit into most allocations; the person may add more. */
const presetCandidates = 3;

/** Chooses the candidates of a bench pack and hands over the archive. */
export function BenchPackDialog({ reference, detail, onDone }: { reference: string; detail: CaseDetail; onDone: () => void }) {
  const entries = detail.advice.ranking.filter(({ status }) => status === "ranked" || status === "infeasible");
  const [chosen, setChosen] = useState<ReadonlySet<StrategyId>>(() => new Set(entries.slice(0, presetCandidates).map(({ strategy }) => strategy)));
  const ordered = entries.map(({ strategy }) => strategy).filter((strategy) => chosen.has(strategy));
  return (
    <Dialog open onOpenChange={(open) => !open && onDone()}>
      <DialogContent className="max-w-2xl">
        <DialogTitle>Bench pack</DialogTitle>
        <DialogDescription>
          An archive with an options file for each candidate and a shell script that runs your own program with each on your cluster, keeps the logs and sends them back with a key.
        </DialogDescription>
        <div className="grid gap-5">
          <CandidateChoice entries={entries} chosen={chosen} onChange={setChosen} />
          <p className="text-sm text-faint">The script is plain sh, goes on where an allocation ended, shows with --dry-run what it would do, and needs no root. Memory and time in it come from the estimate, which is no guarantee.</p>
          <DialogActions>
            <Button variant="quiet" onClick={onDone}>Cancel</Button>
            {ordered.length === 0 ? (
              <Button variant="main" disabled><Download aria-hidden /> Download</Button>
            ) : (
              <Button variant="main" asChild>
                <a href={`/api/v1/cases/${reference}/bench-pack?strategies=${ordered.join(",")}`} download onClick={() => setTimeout(onDone, 0)}><Download aria-hidden /> Download</a>
              </Button>
            )}
          </DialogActions>
        </div>
      </DialogContent>
    </Dialog>
  );
}
