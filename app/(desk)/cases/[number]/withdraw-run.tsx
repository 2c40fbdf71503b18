"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { notify } from "@/components/ui/notify";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import type { RunView } from "@/lib/api/contract/runs";
import { callApi, problemText } from "@/lib/queries/call-api";
import { caseKeys } from "@/lib/queries/cases";
import { hitRateKeys } from "@/lib/queries/hit-rates";

/** Takes a run out of every count; it stays on record, marked. */
export function WithdrawRun({ run, onDone }: { reference: string; run: RunView; onDone: () => void }) {
  const [reason, setReason] = useState("");
  const queryClient = useQueryClient();
  const withdraw = useMutation({
    mutationFn: () => callApi<unknown>(`/runs/${run.id}/withdraw`, { method: "POST", body: { reason } }),
    onSuccess: async () => {
      await Promise.all([queryClient.invalidateQueries({ queryKey: caseKeys.all }), queryClient.invalidateQueries({ queryKey: hitRateKeys.all })]);
      notify("The run was withdrawn. It stays on record and no longer counts.");
      onDone();
    },
  });
  return (
    <Dialog open onOpenChange={(open) => !open && onDone()}>
      <DialogContent>
        <DialogTitle>Withdraw this run</DialogTitle>
        <DialogDescription>It stays on record, marked as withdrawn, and counts nowhere: not in hit rates, not as evidence.</DialogDescription>
        <Field label="Why" help="For whoever reads the record later." error={withdraw.error === null ? undefined : problemText(withdraw.error)}>
          <Input value={reason} onChange={(event) => setReason(event.target.value)} maxLength={1000} />
        </Field>
        <DialogActions>
          <Button variant="quiet" onClick={onDone}>Keep it</Button>
          <Button variant="bad" disabled={withdraw.isPending} onClick={() => withdraw.mutate()}>Withdraw the run</Button>
        </DialogActions>
      </DialogContent>
    </Dialog>
  );
}
