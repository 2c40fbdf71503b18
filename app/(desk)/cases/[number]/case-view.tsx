"use client";

import { useQuery } from "@tanstack/react-query";
import { Copy, Plus, Printer } from "lucide-react";
import dynamic from "next/dynamic";
import Link from "next/link";
import { useState } from "react";
import { AnswersSummary } from "@/components/advice/answers-summary";
import { BelowTheLine } from "@/components/advice/below-the-line";
import { EntryDetail } from "@/components/advice/entry-detail";
import { RankingList } from "@/components/advice/ranking-list";
import { Caution } from "@/components/layout/caution";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginSection, Sheet } from "@/components/layout/sheet";
import { SizeFacts } from "@/components/questionnaire/live-margin";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { CaseDetail } from "@/lib/api/contract/cases";
import { caseQuery } from "@/lib/queries/cases";
import { formatDate } from "@/lib/shared/format-date";
import { AdviseAgain } from "./advise-again";
import { measuredRatios } from "./measured-ratios";
import { NearestCases } from "./nearest-cases";
import { OptionsPanel } from "./options-panel";
import { RunsSection } from "./runs-section";

const ScalingSection = dynamic(() => import("./scaling-section").then((module) => module.ScalingSection), { ssr: false });

type CaseViewProps = { reference: string; initial: CaseDetail; mayWrite: boolean };

/** A case as its team sees it: ranked advice, what stands below the line, runs against predictions. */
export function CaseView({ reference, initial, mayWrite }: CaseViewProps) {
  const { data: detail = initial } = useQuery({ ...caseQuery(reference), initialData: initial });
  const [reporting, setReporting] = useState(false);
  const { advice } = detail;
  const ranked = advice.ranking.filter((entry) => entry.status === "ranked");
  const others = advice.ranking.filter((entry) => entry.status !== "ranked");
  const [first] = ranked;
  return (
    <Sheet margin={<CaseMargin detail={detail} />}>
      <PageTitle
        above={
          <span className="flex flex-wrap items-center gap-2 text-sm text-faint">
            Case {detail.number}
            {detail.demonstration && <Badge tone="faint">demonstration data, invented</Badge>}
          </span>
        }
        title={detail.title === "" ? `Case ${detail.number}` : detail.title}
        below={<AdviceLine detail={detail} />}
        actions={
          <>
            <Button variant="quiet" onClick={() => window.print()} aria-label="Print the advice"><Printer aria-hidden /> Print</Button>
            {mayWrite && <Button asChild><Link href={`/cases/new?from=${detail.number}`}><Copy aria-hidden /> Copy as a new case</Link></Button>}
            {mayWrite && <AdviseAgain reference={reference} />}
            {mayWrite && <Button variant="main" onClick={() => setReporting(true)}><Plus aria-hidden /> Report a run</Button>}
          </>
        }
      />
      {advice.cautions.length > 0 && (
        <Notice tone="warn" title="Mind">
          <ul className="grid gap-1">{advice.cautions.map((caution, index) => <li key={index}>{caution}</li>)}</ul>
        </Notice>
      )}
      {detail.adviceChanges.length > 0 && (
        <Notice title="What changed since the advice before">
          <ul className="grid gap-1">{detail.adviceChanges.map((change, index) => <li key={index}>{change}</li>)}</ul>
        </Notice>
      )}
      <section aria-labelledby="ranking" className="grid grid-cols-1 gap-2">
        <h2 id="ranking" className="text-lg font-semibold">Ranked strategies</h2>
        <p className="text-sm text-faint">Time relative to the first: predicted time times the factors of rules, priority and evidence. Bars are 80 % ranges; pegs are measured runs.</p>
        {first === undefined && <Notice tone="bad" title="No strategy may compete">The reasons stand below, one for each. More memory, more nodes or another capability of your program would let some in.</Notice>}
        <RankingList
          key={detail.adviceId}
          entries={ranked}
          memoryAvailableGiB={detail.limits.memoryGiB}
          measured={measuredRatios(detail)}
          detail={(entry) => <EntryDetail entry={entry} spacing={advice.sizes.spacing} options={<OptionsPanel reference={reference} adviceId={detail.adviceId} strategy={entry.strategy} />} />}
        />
      </section>
      {others.length > 0 && (
        <section aria-labelledby="below" className="grid grid-cols-1 gap-2">
          <h2 id="below" className="text-lg font-semibold">Below the line</h2>
          <BelowTheLine entries={others} />
        </section>
      )}
      {first !== undefined && <ScalingSection reference={reference} adviceId={detail.adviceId} />}
      <RunsSection reference={reference} detail={detail} mayWrite={mayWrite} reporting={reporting} onReporting={setReporting} />
    </Sheet>
  );
}

function AdviceLine({ detail }: { detail: CaseDetail }) {
  const given = detail.adviceGiven.find((advice) => advice.id === detail.adviceId);
  const runs = detail.advice.evidence.runs;
  return (
    <>
      Advice {given?.sequence ?? 1}, given {formatDate(given?.givenAt)} under edition {detail.advice.edition.number}, model {detail.advice.modelVersion},{" "}
      {runs === 0 ? "with no recorded run to lean on" : `with ${runs} recorded ${runs === 1 ? "run" : "runs"} as evidence`}. Frozen as given.
    </>
  );
}

function CaseMargin({ detail }: { detail: CaseDetail }) {
  return (
    <Margin>
      <MarginSection title="Answers">
        <AnswersSummary questionnaire={detail.questionnaire} machineName={detail.machine.name} memoryGiB={detail.limits.memoryGiB} />
      </MarginSection>
      <MarginSection title="Sizes">
        <SizeFacts sizes={detail.advice.sizes} />
      </MarginSection>
      <NearestCases nearest={detail.advice.nearestCases} />
      {detail.adviceGiven.length > 1 && (
        <MarginSection title="Advice given">
          <ol className="grid gap-1">
            {detail.adviceGiven.map((given) => (
              <li key={given.id} className="flex justify-between gap-3">
                <span>{given.sequence}. {formatDate(given.givenAt)}</span>
                <span className="text-faint">edition {given.edition}</span>
              </li>
            ))}
          </ol>
        </MarginSection>
      )}
      <Caution />
    </Margin>
  );
}
