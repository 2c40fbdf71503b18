"use client";

import { useMutation } from "@tanstack/react-query";
import { LogDrop } from "@/components/logs/log-drop";
import { LogReading } from "@/components/logs/log-reading";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { LogRead } from "@/lib/api/contract/logs";
import { callApi, problemText } from "@/lib/queries/call-api";
import { readLines } from "./log-lines";

/** A log that was read and not yet recorded. */
export type ReadLog = { file: Blob; name: string; read: LogRead; lineTexts: Record<number, string> };

type LogIntakeProps = { reference: string; log: ReadLog | null; onLog: (log: ReadLog | null) => void };

/** Reads a log without recording it, and shows what was understood, so that the person can look over the form it fills. */
export function LogIntake({ reference, log, onLog }: LogIntakeProps) {
  const reading = useMutation({
    mutationFn: async ({ file, name }: { file: Blob; name: string }): Promise<ReadLog> => {
      const read = await callApi<LogRead>(`/cases/${reference}/logs?record=false`, { method: "POST", file });
      return { file, name, read, lineTexts: await readLines(file, new Set(Object.values(read.parsed.lines))) };
    },
    onSuccess: onLog,
  });
  if (log !== null) {
    return (
      <section aria-label="What the log says" className="grid gap-3 border-b border-hairline pb-4">
        <div className="flex flex-wrap items-baseline justify-between gap-3">
          <h3 className="font-semibold">What {log.name} says</h3>
          <Button size="small" variant="quiet" onClick={() => onLog(null)}>Take another log</Button>
        </div>
        <LogReading title={log.name} read={log.read} lineTexts={log.lineTexts} />
        {(log.read.parsed.strategy === null || log.read.parsed.outcome === null) && (
          <Notice tone="warn">The log leaves {log.read.parsed.strategy === null ? "the strategy" : "the outcome"} open: choose it below.</Notice>
        )}
      </section>
    );
  }
  return (
    <div className="grid gap-3">
      <LogDrop busy={reading.isPending} onLog={(file, name) => reading.mutate({ file, name })} />
      {reading.error !== null && <Notice tone="bad" title="The log can't be read" announce>{problemText(reading.error)}</Notice>}
    </div>
  );
}
