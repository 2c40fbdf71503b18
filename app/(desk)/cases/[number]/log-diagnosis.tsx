"use client";

import { useQuery } from "@tanstack/react-query";
import { useEffect, useRef, useState } from "react";
import { FindingList } from "@/components/logs/finding-list";
import { LogReading } from "@/components/logs/log-reading";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { RunView } from "@/lib/api/contract/runs";
import { problemText } from "@/lib/queries/call-api";
import { runLogQuery, runQuery } from "@/lib/queries/runs";

/** The diagnosis of a run and what its log said, asked for when the run is unfolded. */
export function LogDiagnosis({ run }: { run: RunView }) {
  const place = useRef<HTMLDivElement>(null);
  const [unfolded, setUnfolded] = useState(false);
  const [showing, setShowing] = useState(false);
  const { data, error } = useQuery({ ...runQuery(run.id, run.revision), enabled: unfolded });
  const log = useQuery(runLogQuery(run.id, showing));

  useEffect(() => {
    const details = place.current?.closest("details");
    if (!details) return undefined;
    const look = () => setUnfolded((before) => before || details.open);
    look();
    details.addEventListener("toggle", look);
    return () => details.removeEventListener("toggle", look);
  }, []);

  return (
    <div ref={place} className="grid gap-3">
      {error !== null && <Notice tone="bad">{problemText(error)}</Notice>}
      {data !== undefined && data.findings.length > 0 && (
        <section aria-label="Diagnosis" className="grid gap-2">
          <h3 className="text-sm font-semibold">Diagnosis</h3>
          <FindingList findings={data.findings} />
        </section>
      )}
      {data?.hasLog === true && !showing && (
        <div data-screen-only>
          <Button size="small" onClick={() => setShowing(true)}>Show what its log said</Button>
        </div>
      )}
      {log.error !== null && <Notice tone="bad">{problemText(log.error)}</Notice>}
      {log.data !== undefined && <LogReading title={log.data.fileName === "" ? "the log" : log.data.fileName} read={log.data} withoutFindings />}
    </div>
  );
}
