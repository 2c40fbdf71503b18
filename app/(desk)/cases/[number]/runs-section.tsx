"use client";

import dynamic from "next/dynamic";
import { useState } from "react";
import { RunList } from "@/components/runs/run-list";
import { Button } from "@/components/ui/button";
import type { CaseDetail } from "@/lib/api/contract/cases";
import type { RunView } from "@/lib/api/contract/runs";

const ReportRun = dynamic(() => import("./report-run").then((module) => module.ReportRun));
const LogSnippet = dynamic(() => import("./log-snippet").then((module) => module.LogSnippet));
const BenchPackDialog = dynamic(() => import("./bench-pack-dialog").then((module) => module.BenchPackDialog));
const LogDiagnosis = dynamic(() => import("./log-diagnosis").then((module) => module.LogDiagnosis));
const WithdrawRun = dynamic(() => import("./withdraw-run").then((module) => module.WithdrawRun));
const FormerValues = dynamic(() => import("./former-values").then((module) => module.FormerValues));

type RunsSectionProps = { reference: string; detail: CaseDetail; mayWrite: boolean; reporting: boolean; onReporting: (reporting: boolean) => void };

/** The case's runs, and the ways to add, correct and withdraw one. */
export function RunsSection({ reference, detail, mayWrite, reporting, onReporting }: RunsSectionProps) {
  const [correcting, setCorrecting] = useState<RunView | null>(null);
  const [withdrawing, setWithdrawing] = useState<RunView | null>(null);
  const [history, setHistory] = useState<RunView | null>(null);
  const [opened, setOpened] = useState<"snippet" | "bench-pack" | null>(null);
  const [recorded, setRecorded] = useState<string | null>(null);
  return (
    <section aria-labelledby="runs" className="grid grid-cols-1 gap-3">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h2 id="runs" className="text-lg font-semibold">Runs</h2>
        <div className="flex flex-wrap gap-2" data-screen-only>
          {detail.advice.ranking.length > 0 && <Button size="small" variant="quiet" onClick={() => setOpened("bench-pack")}>Bench pack</Button>}
          {mayWrite && <Button size="small" variant="quiet" onClick={() => setOpened("snippet")}>From the batch job</Button>}
          {mayWrite && <Button size="small" onClick={() => onReporting(true)}>Report a run</Button>}
        </div>
      </div>
      {detail.runList.length === 0 ? (
        <p className="text-sm text-faint">
          No run yet. Report what happened, good or bad; running a second strategy too makes the case count for the hit rate best.
        </p>
      ) : (
        <RunList runs={detail.runList} onCorrect={mayWrite ? setCorrecting : null} onWithdraw={mayWrite ? setWithdrawing : null} onHistory={setHistory} open={recorded} below={(run) => <LogDiagnosis run={run} />} />
      )}
      {(reporting || correcting !== null) && (
        <ReportRun
          key={correcting?.id ?? "new"}
          reference={reference}
          detail={detail}
          correcting={correcting}
          onDone={(run) => {
            setRecorded(run);
            onReporting(false);
            setCorrecting(null);
          }}
        />
      )}
      {opened === "snippet" && <LogSnippet caseNumber={detail.number} onDone={() => setOpened(null)} />}
      {opened === "bench-pack" && <BenchPackDialog reference={reference} detail={detail} onDone={() => setOpened(null)} />}
      {withdrawing !== null && <WithdrawRun reference={reference} run={withdrawing} onDone={() => setWithdrawing(null)} />}
      {history !== null && <FormerValues run={history} onDone={() => setHistory(null)} />}
    </section>
  );
}
