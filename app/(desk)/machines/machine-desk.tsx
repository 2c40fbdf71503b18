"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { Plus } from "lucide-react";
import { useState } from "react";
import { notify } from "@/components/ui/notify";
import { EmptyState } from "@/components/layout/empty-state";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginSection, Sheet } from "@/components/layout/sheet";
import { MachineForm } from "@/components/machines/machine-form";
import { MachineTable } from "@/components/machines/machine-table";
import { AlertDialog, AlertDialogAction, AlertDialogCancel, AlertDialogContent, AlertDialogDescription, AlertDialogTitle } from "@/components/ui/alert-dialog";
import { Button } from "@/components/ui/button";
import { Dialog, DialogActions, DialogContent, DialogDescription, DialogTitle } from "@/components/ui/dialog";
import type { MachineView } from "@/lib/api/contract/machines";
import { defaultRates, machineSchema, type Machine } from "@/lib/questionnaire/machine";
import { callApi, problemText } from "@/lib/queries/call-api";
import { machineKeys, machinesQuery } from "@/lib/queries/machines";

type MachineDeskProps = { initial: MachineView[]; mayAdd: boolean; mayManage: boolean };

const blank: Machine = { name: "", nodes: 1, coresPerNode: 32, memoryPerNodeGiB: 128, ...defaultRates };

/** The team's machine sheets: read by all, added by who writes cases, changed and deleted by owners. */
export function MachineDesk({ initial, mayAdd, mayManage }: MachineDeskProps) {
  const { data: machines = initial } = useQuery({ ...machinesQuery(), initialData: initial });
  const [edited, setEdited] = useState<MachineView | "new" | null>(null);
  const [deleted, setDeleted] = useState<MachineView | null>(null);
  return (
    <Sheet
      margin={
        <Margin>
          <MarginSection title="What the rates are for">
            <p className="text-faint">Sparse solvers move more than they compute: time per iteration follows the memory bandwidth, factorisations follow the dense rate, and many small messages follow the latency.</p>
          </MarginSection>
          <MarginSection title="A sheet that changes">
            <p className="text-faint">Advice already given keeps the figures it was given with. Ask for advice again to use the new ones.</p>
          </MarginSection>
        </Margin>
      }
    >
      <PageTitle title="Machines" below="A sheet for each computer, so that a case names one instead of typing it in." actions={mayAdd && <Button variant="main" onClick={() => setEdited("new")}><Plus aria-hidden /> New sheet</Button>} />
      {machines.length === 0 ? (
        <EmptyState title="No machine sheet yet" text="Save the computer that most of your jobs run on; the questionnaire will offer it." />
      ) : (
        <MachineTable machines={machines} onEdit={mayManage ? setEdited : null} onDelete={mayManage ? setDeleted : null} />
      )}
      {edited !== null && <EditSheet machine={edited === "new" ? null : edited} onDone={() => setEdited(null)} />}
      {deleted !== null && <DeleteSheet machine={deleted} onDone={() => setDeleted(null)} />}
    </Sheet>
  );
}

function EditSheet({ machine, onDone }: { machine: MachineView | null; onDone: () => void }) {
  const queryClient = useQueryClient();
  const save = useMutation({
    mutationFn: (sheet: Machine) => (machine === null ? callApi<MachineView>("/machines", { method: "POST", body: sheet }) : callApi<MachineView>(`/machines/${machine.id}`, { method: "PATCH", body: sheet })),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: machineKeys.all });
      notify("The machine sheet was saved.");
      onDone();
    },
  });
  return (
    <Dialog open onOpenChange={(open) => !open && onDone()}>
      <DialogContent className="max-w-2xl">
        <DialogTitle>{machine === null ? "New machine sheet" : `Change ${machine.name}`}</DialogTitle>
        <DialogDescription>Change what you know; the defaults are those of a common two-socket server.</DialogDescription>
        <MachineForm
          initial={machine === null ? blank : sheetOf(machine)}
          submitLabel="Save the sheet"
          submitting={save.isPending}
          refusal={save.error === null ? null : { message: problemText(save.error), error: save.error }}
          onSubmit={(sheet) => save.mutate(sheet)}
          onCancel={onDone}
        />
      </DialogContent>
    </Dialog>
  );
}

function DeleteSheet({ machine, onDone }: { machine: MachineView; onDone: () => void }) {
  const queryClient = useQueryClient();
  const remove = useMutation({
    mutationFn: () => callApi<unknown>(`/machines/${machine.id}`, { method: "DELETE" }),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: machineKeys.all });
      notify("The machine sheet was deleted.");
      onDone();
    },
    onError: (error) => {
      notify(problemText(error));
      onDone();
    },
  });
  return (
    <AlertDialog open onOpenChange={(open) => !open && onDone()}>
      <AlertDialogContent>
        <AlertDialogTitle>Delete {machine.name}?</AlertDialogTitle>
        <AlertDialogDescription>No case names it. It can be typed in again, but not brought back.</AlertDialogDescription>
        <DialogActions>
          <AlertDialogCancel>Keep it</AlertDialogCancel>
          <AlertDialogAction onClick={() => remove.mutate()}>Delete the sheet</AlertDialogAction>
        </DialogActions>
      </AlertDialogContent>
    </AlertDialog>
  );
}

function sheetOf(machine: MachineView): Machine {
  return machineSchema.parse(Object.fromEntries(Object.keys(machineSchema.shape).map((name) => [name, machine[machineSchema.keyof().parse(name)]])));
}
