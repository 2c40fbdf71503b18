"use client";

import type { ReactNode } from "react";
import { useFormContext, useWatch } from "react-hook-form";
import type { FormValues } from "@/lib/questionnaire/form-values";
import type { SavedMachine } from "./check-form";
import { ChoiceQuestion, NumberQuestion } from "./question-field";

/** The hardware, from a saved sheet or typed in. `saveSheet` stands beside typed hardware, for who may save one. */
export function MachineQuestions({ machines, saveSheet }: { machines: readonly SavedMachine[]; saveSheet: ReactNode }) {
  const { control } = useFormContext<FormValues>();
  const machineId = useWatch({ control, name: "hardware.machineId" });
  const sheets = machines.map((machine) => ({
    value: machine.id,
    label: `${machine.name}: ${machine.nodes} x ${machine.coresPerNode} cores, ${machine.memoryPerNodeGiB} GiB a node`,
  }));
  return (
    <>
      <ChoiceQuestion name="hardware.machineId" choices={[{ value: "", label: "Type it in" }, ...sheets]} />
      <NumberQuestion name="hardware.cores" />
      {machineId === "" && (
        <>
          <NumberQuestion name="hardware.nodes" />
          <NumberQuestion name="hardware.memoryPerNodeGiB" />
          {saveSheet}
        </>
      )}
    </>
  );
}
