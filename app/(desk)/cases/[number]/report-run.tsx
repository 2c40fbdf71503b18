"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useMemo, useState } from "react";
import { notify } from "@/components/ui/notify";
import { correctionsOf, formOfLog } from "@/components/logs/log-form-values";
import { RunForm } from "@/components/runs/run-form";
import { runFormOf } from "@/components/runs/run-form-values";
import { Dialog, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";
import type { CaseDetail } from "@/lib/api/contract/cases";
import type { LogRead } from "@/lib/api/contract/logs";
import type { RunRecorded, RunView } from "@/lib/api/contract/runs";
import { ApiProblem, callApi, newIdempotencyKey, problemText } from "@/lib/queries/call-api";
import { caseKeys } from "@/lib/queries/cases";
import { hitRateKeys } from "@/lib/queries/hit-rates";
import type { RunReport } from "@/lib/runs/run";
import { emptyRunForm, type RunFormValues } from "@/lib/runs/run-form";
import { LogIntake, type ReadLog } from "./log-intake";

type ReportRunProps = { reference: string; detail: CaseDetail; correcting: RunView | null; /** The run recorded, or null when nothing was. */ onDone: (run: string | null) => void };

/** A run report by hand, or the correction of one. */
export function ReportRun({ reference, detail, correcting, onDone }: ReportRunProps) {
  const queryClient = useQueryClient();
  const [idempotencyKey] = useState(newIdempotencyKey);
  const [log, setLog] = useState<ReadLog | null>(null);
  const initial = useMemo(() => {
    if (correcting) return runFormOf(correcting);
    return log === null ? newReport(detail) : formOfLog(log.read.parsed, newReport(detail));
  }, [correcting, detail, log]);
  const save = useMutation({
    mutationFn: async ({ report, explanation }: { report: RunReport; explanation: string }) => {
      if (correcting) {
        const body = { ...report, explanation, revision: correcting.revision };
        return (await callApi<{ id: string }>(`/runs/${correcting.id}`, { method: "PATCH", body })).id;
      }
      if (log !== null) {
        const search = correctionsOf(report);
        search.set("record", "true");
        search.set("fileName", log.name.slice(0, 200));
        if (log.mapping !== null) search.set("mapping", log.mapping);
        return (await callApi<LogRead>(`/cases/${reference}/logs?${search.toString()}`, { method: "POST", file: log.file, idempotencyKey })).runId;
      }
      // A refused body leaves the key unused, so a mended one can be sent under it.
      return (await callApi<RunRecorded>(`/cases/${reference}/runs`, { method: "POST", body: report, idempotencyKey })).id;
    },
    onSuccess: async (id) => {
      await Promise.all([queryClient.invalidateQueries({ queryKey: caseKeys.all }), queryClient.invalidateQueries({ queryKey: hitRateKeys.all })]);
      notify(correcting ? "The run was corrected; its former values are kept." : "The run was recorded.");
      onDone(id);
    },
  });
  return (
    <Dialog open onOpenChange={(open) => !open && onDone(null)}>
      <DialogContent className="max-w-2xl">
        <DialogTitle>{correcting ? "Correct the run" : "Report a run"}</DialogTitle>
        <DialogDescription>Only the strategy and the outcome must be given. Failed runs are as welcome as good ones.</DialogDescription>
        {correcting === null && <LogIntake reference={reference} log={log} onLog={setLog} />}
        <RunForm
          key={log === null ? "by hand" : `${log.name} ${log.mapping ?? ""}`}
          initial={initial}
          correcting={correcting !== null}
          submitting={save.isPending}
          refusal={save.error === null ? null : { message: problemText(save.error), fields: save.error instanceof ApiProblem ? save.error.fields : [] }}
          onSubmit={(report, explanation) => save.mutate({ report, explanation })}
          onCancel={() => onDone(null)}
        />
      </DialogContent>
    </Dialog>
  );
}

/** Preset to the advice's first strategy, or to the best ranked one without a run. */
function newReport(detail: CaseDetail): RunFormValues {
  const measured = new Set(detail.runList.filter((run) => !run.withdrawn).map((run) => run.strategy));
  const ranked = detail.advice.ranking.filter((entry) => entry.status === "ranked");
  const preset = ranked.find((entry) => !measured.has(entry.strategy)) ?? ranked[0];
  return { ...emptyRunForm, strategy: preset?.strategy ?? "direct-ldlt", cores: String(detail.limits.cores) };
}
