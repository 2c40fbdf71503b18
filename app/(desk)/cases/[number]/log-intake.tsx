"use client";

import { useMutation } from "@tanstack/react-query";
import dynamic from "next/dynamic";
import { useState } from "react";
import { LogDrop } from "@/components/logs/log-drop";
import { LogReading } from "@/components/logs/log-reading";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { LogRead } from "@/lib/api/contract/logs";
import { callApi, problemText, searchString } from "@/lib/queries/call-api";
import { readLines } from "./log-lines";

const LogFormat = dynamic(() => import("./log-format").then((module) => module.LogFormat));

/** A log that was read and not yet recorded; `mapping` is the id of the team's own format it was read by. */
export type ReadLog = { file: Blob; name: string; mapping: string | null; read: LogRead; lineTexts: Record<number, string> };

type LogIntakeProps = { reference: string; log: ReadLog | null; onLog: (log: ReadLog | null) => void };
type Asked = { file: Blob; name: string; mapping: string | null };

/** Reads a log without recording it, and shows what was understood, so that the person can look over the form it fills. */
export function LogIntake({ reference, log, onLog }: LogIntakeProps) {
  const reading = useMutation({
    mutationFn: async ({ file, name, mapping }: Asked): Promise<ReadLog> => {
      const search = searchString({ record: "false", mapping: mapping ?? undefined });
      const read = await callApi<LogRead>(`/cases/${reference}/logs${search}`, { method: "POST", file });
      return { file, name, mapping, read, lineTexts: await readLines(file, new Set(Object.values(read.parsed.lines))) };
    },
    onSuccess: onLog,
  });
  return (
    <div className="grid gap-3">
      {log === null ? (
        <LogDrop busy={reading.isPending} onLog={(file, name) => reading.mutate({ file, name, mapping: null })} />
      ) : (
        <WhatItSays log={log} onFormat={(mapping) => reading.mutate({ file: log.file, name: log.name, mapping })} onOther={() => onLog(null)} />
      )}
      {reading.error !== null && <Notice tone="bad" title="The log can't be read" announce>{problemText(reading.error)}</Notice>}
    </div>
  );
}

function WhatItSays({ log, onFormat, onOther }: { log: ReadLog; onFormat: (mapping: string | null) => void; onOther: () => void }) {
  const { strategy, outcome } = log.read.parsed;
  const [choosing, setChoosing] = useState(false);
  const open = [strategy === null ? "the strategy" : "", outcome === null ? "the outcome" : ""].filter((word) => word !== "");
  return (
    <section aria-label="What the log says" className="grid gap-3 border-b border-hairline pb-4">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h3 className="font-semibold">What {log.name} says</h3>
        <span className="flex flex-wrap gap-2">
          <Button size="small" variant="quiet" aria-expanded={choosing} onClick={() => setChoosing(!choosing)}>Another format</Button>
          <Button size="small" variant="quiet" onClick={onOther}>Take another log</Button>
        </span>
      </div>
      {choosing && <LogFormat log={log} onFormat={onFormat} />}
      <LogReading title={log.name} read={log.read} lineTexts={log.lineTexts} />
      {open.length > 0 && <Notice tone="warn">The log leaves {open.join(" and ")} open: choose below.</Notice>}
    </section>
  );
}
