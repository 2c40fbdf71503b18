"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { useFormContext } from "react-hook-form";
import { MachineForm } from "@/components/machines/machine-form";
import { Button } from "@/components/ui/button";
import { Dialog, DialogContent, DialogDescription, DialogTitle, DialogTrigger } from "@/components/ui/dialog";
import type { MachineView } from "@/lib/api/contract/machines";
import { readNumber, type FormValues } from "@/lib/questionnaire/form-values";
import { defaultRates, type Machine } from "@/lib/questionnaire/machine";
import { callApi, problemText } from "@/lib/queries/call-api";
import { machineKeys } from "@/lib/queries/machines";

/** Saves the hardware typed into the questionnaire as a machine sheet and picks it. */
export function SaveSheetDialog({ values }: { values: FormValues }) {
  const [open, setOpen] = useState(false);
  const queryClient = useQueryClient();
  const { setValue } = useFormContext<FormValues>();
  const save = useMutation({
    mutationFn: (machine: Machine) => callApi<MachineView>("/machines", { method: "POST", body: machine }),
    onSuccess: (machine) => {
      queryClient.setQueryData(machineKeys.all, (known: MachineView[] | undefined) => [...(known ?? []), machine]);
      setValue("hardware.machineId", machine.id, { shouldDirty: true, shouldValidate: true });
      setOpen(false);
    },
  });
  return (
    <div className="flex items-end sm:col-span-2">
      <Dialog open={open} onOpenChange={setOpen}>
        <DialogTrigger asChild>
          <Button size="small">Save this machine as a sheet</Button>
        </DialogTrigger>
        <DialogContent>
          <DialogTitle>New machine sheet</DialogTitle>
          <DialogDescription>The rates decide how times scale. Change what you know; the defaults are those of a common two-socket server.</DialogDescription>
          <MachineForm
            initial={sheetFrom(values)}
            submitLabel="Save the sheet"
            submitting={save.isPending}
            refusal={save.error === null ? null : { message: problemText(save.error), error: save.error }}
            onSubmit={(machine) => save.mutate(machine)}
            onCancel={() => setOpen(false)}
          />
        </DialogContent>
      </Dialog>
    </div>
  );
}

function sheetFrom(values: FormValues): Machine {
  const nodes = readNumber(values.hardware.nodes) ?? 1;
  const cores = readNumber(values.hardware.cores) ?? 1;
  return {
    name: "",
    nodes,
    coresPerNode: Math.max(1, Math.ceil(cores / nodes)),
    memoryPerNodeGiB: readNumber(values.hardware.memoryPerNodeGiB) ?? 128,
    ...defaultRates,
  };
}
