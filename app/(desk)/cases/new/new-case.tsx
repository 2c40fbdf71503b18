"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useDeferredValue, useMemo, useRef, useState } from "react";
import { Margin, Sheet } from "@/components/layout/sheet";
import { Caution } from "@/components/layout/caution";
import { PageTitle } from "@/components/layout/page-title";
import { checkForm } from "@/components/questionnaire/check-form";
import { LiveMargin } from "@/components/questionnaire/live-margin";
import { QuestionnaireForm } from "@/components/questionnaire/questionnaire-form";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { MachineView } from "@/lib/api/contract/machines";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { toFormValues, type FormValues } from "@/lib/questionnaire/form-values";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { ApiProblem, callApi, newIdempotencyKey, problemText } from "@/lib/queries/call-api";
import { caseKeys, provisionalAdviceQuery } from "@/lib/queries/cases";
import { machinesQuery } from "@/lib/queries/machines";
import { SaveSheetDialog } from "./save-sheet-dialog";
import { useDebounced } from "./use-debounced";
import { clearDraft, useDraft, writeDraft } from "./draft";

type NewCaseProps = {
  team: string;
  copiedFrom: string | null;
  copyMissing: boolean;
  initial: FormValues;
  machines: MachineView[];
  mayAddMachines: boolean;
};

/** The questionnaire with its live margin. A draft outlives a reload; a copy starts from its case instead. */
export function NewCase({ team, copiedFrom, copyMissing, initial, machines: loadedMachines, mayAddMachines }: NewCaseProps) {
  const draft = useDraft(team, copiedFrom ?? "new");
  const [fresh, setFresh] = useState(0);
  if (draft === undefined) return <Sheet><PageTitle title="New case" /></Sheet>;
  const start = fresh > 0 ? toFormValues(defaultQuestionnaire) : (draft ?? initial);
  return (
    <Desk
      key={`${fresh}`}
      team={team}
      copiedFrom={copiedFrom}
      copyMissing={copyMissing}
      initial={start}
      restored={fresh === 0 && draft !== null}
      machines={loadedMachines}
      mayAddMachines={mayAddMachines}
      onStartOver={() => {
        clearDraft(team, copiedFrom ?? "new");
        setFresh((count) => count + 1);
      }}
    />
  );
}

type DeskProps = NewCaseProps & { restored: boolean; onStartOver: () => void };

function Desk({ team, copiedFrom, copyMissing, initial, restored, machines: loadedMachines, mayAddMachines, onStartOver }: DeskProps) {
  const router = useRouter();
  const queryClient = useQueryClient();
  const { data: machines = loadedMachines } = useQuery({ ...machinesQuery(), initialData: loadedMachines });
  const [values, setValues] = useState(initial);
  const checked = useMemo(() => checkForm(values, machines), [values, machines]);
  const settled = useDebounced(checked.questionnaire, 250);
  const asked = useDeferredValue(settled);
  const advice = useQuery(provisionalAdviceQuery(asked));
  const attempt = useRef<{ body: string; key: string } | null>(null);

  const create = useMutation({
    mutationFn: (questionnaire: Questionnaire) => {
      // The same answers sent again after a lost connection keep their key: the case is not made twice.
      const body = JSON.stringify(questionnaire);
      if (attempt.current?.body !== body) attempt.current = { body, key: newIdempotencyKey() };
      return callApi<{ number: number }>("/cases", { method: "POST", body: { questionnaire }, idempotencyKey: attempt.current.key });
    },
    onSuccess: async ({ number }) => {
      clearDraft(team, copiedFrom ?? "new");
      await queryClient.invalidateQueries({ queryKey: caseKeys.all });
      router.push(`/cases/${number}`);
    },
  });

  const refusal = useMemo(
    () => (create.error === null ? null : { message: problemText(create.error), fields: create.error instanceof ApiProblem ? create.error.fields : [] }),
    [create.error],
  );

  return (
    <Sheet
      margin={
        <Margin label="What the answers imply" following>
          <LiveMargin sizes={checked.sizes} advice={advice.data} stale={advice.isFetching || asked !== checked.questionnaire} failure={advice.error === null ? null : problemText(advice.error)} />
          <Caution />
        </Margin>
      }
    >
      <PageTitle
        title={copiedFrom === null ? "New case" : `New case, from case ${copiedFrom}`}
        below="Answer what you know; the rest has defaults that fit. The margin follows as you answer."
        actions={<Button variant="quiet" onClick={onStartOver}>Start over</Button>}
      />
      {restored && (
        <Notice title="Your draft was kept">These are the answers you had given in this browser before. Start over to set them all back.</Notice>
      )}
      {copyMissing && <Notice tone="warn" title="There is no such case to copy">The form starts from the defaults instead.</Notice>}
      <QuestionnaireForm
        initial={initial}
        machines={machines}
        onChange={(next) => {
          setValues(next);
          writeDraft(team, copiedFrom ?? "new", next);
        }}
        onSubmit={(questionnaire) => create.mutate(questionnaire)}
        submitting={create.isPending || create.isSuccess}
        refusal={refusal}
        saveSheet={() => (mayAddMachines ? <SaveSheetDialog values={values} /> : null)}
      />
    </Sheet>
  );
}
