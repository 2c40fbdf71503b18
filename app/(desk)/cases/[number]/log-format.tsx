"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { MappingEditor } from "@/components/logs/mapping-editor";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import type { LogMappingView } from "@/lib/api/contract/logs";
import type { LogMapping } from "@/lib/logs/mapping";
import { callApi, problemText } from "@/lib/queries/call-api";
import { logMappingKeys, logMappingsQuery } from "@/lib/queries/log-mappings";
import type { ReadLog } from "./log-intake";
import { readBeginning } from "./log-lines";

/** Reads the log by one of the team's own formats, or by a new one that is tried on it as it is typed. */
export function LogFormat({ log, onFormat }: { log: ReadLog; onFormat: (mapping: string | null) => void }) {
  const queryClient = useQueryClient();
  const formats = useQuery(logMappingsQuery());
  const [making, setMaking] = useState(false);
  const sample = useQuery({ queryKey: ["log-sample", log.name, log.file.size], queryFn: () => readBeginning(log.file), enabled: making, staleTime: Infinity, gcTime: 0 });
  const save = useMutation({
    mutationFn: (mapping: LogMapping) => callApi<LogMappingView>("/log-mappings", { method: "POST", body: mapping }),
    onSuccess: async ({ id }) => {
      await queryClient.invalidateQueries({ queryKey: logMappingKeys.all });
      setMaking(false);
      onFormat(id);
    },
  });
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-end gap-3">
        <Field label="Read it as" className="min-w-60">
          <Select value={log.mapping ?? ""} onChange={(event) => onFormat(event.target.value === "" ? null : event.target.value)}>
            <option value="">what PETSc and MUMPS print</option>
            {(formats.data ?? []).map(({ id, name }) => <option key={id} value={id}>{name}</option>)}
          </Select>
        </Field>
        {!making && <Button onClick={() => setMaking(true)}>New format</Button>}
      </div>
      {formats.error !== null && <Notice tone="bad">{problemText(formats.error)}</Notice>}
      {making && sample.data !== undefined && (
        <MappingEditor sample={sample.data} saving={save.isPending} refusal={save.error === null ? null : problemText(save.error)} onSave={(mapping) => save.mutate(mapping)} onCancel={() => setMaking(false)} />
      )}
    </div>
  );
}
