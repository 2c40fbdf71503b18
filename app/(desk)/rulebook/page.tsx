import { Download, Lightbulb } from "lucide-react";
import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginFacts, MarginSection, Sheet } from "@/components/layout/sheet";
import { DraftList } from "@/components/rulebook/draft-list";
import { RuleBrowser } from "@/components/rulebook/rule-browser";
import { RulesToMind } from "@/components/rulebook/rules-to-mind";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { EditionSummary, EditionView } from "@/lib/api/contract/record";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { AppError } from "@/lib/shared/app-error";
import { formatDate } from "@/lib/shared/format-date";
import { listRuleRecords } from "@/lib/use-cases/refinement/list-rule-records";
import { getEdition } from "@/lib/use-cases/rulebook/get-edition";
import { listDrafts } from "@/lib/use-cases/rulebook/list-drafts";
import { listEditions } from "@/lib/use-cases/rulebook/list-editions";
import { EditionChanges } from "./edition-changes";
import { StartDraft } from "./start-draft";

export const metadata: Metadata = { title: "Rulebook" };

/** The live edition, or the one named by `?edition=`, rule by rule with its record; the drafts of the next one. */
export default async function RulebookPage({ searchParams }: { searchParams: Promise<{ edition?: string | string[] }> }) {
  const actor = await requireActor();
  const { edition: asked = "live" } = await searchParams;
  const [edition, editions, drafts, records] = await Promise.all([
    getEdition(actor, { number: asked === "live" ? asked : Number(asked) }).catch((error: unknown) => {
      if (error instanceof AppError && (error.code === "not-found" || error.code === "invalid")) notFound();
      throw error;
    }),
    listEditions(actor, { limit: 200 }),
    listDrafts(actor, { limit: 50 }),
    listRuleRecords(actor, {}),
  ]);
  const mayEdit = mayRole(actor.role, "rulebook:edit");
  return (
    <Sheet margin={<RulebookMargin edition={edition} editions={editions.items} records={records.items} />}>
      <PageTitle
        title="Rulebook"
        above={<span className="text-sm text-faint">Edition {edition.number}{edition.live ? ", live" : ", not live"}</span>}
        below="Who may compete, with which parameters, with which warning and fall-back."
        actions={
          <>
            <Button asChild variant="quiet"><a href={`/api/v1/rulebook/editions/${edition.number}/export`} download><Download aria-hidden /> Export</a></Button>
            <Button asChild><Link href="/rulebook/proposals"><Lightbulb aria-hidden /> Proposals</Link></Button>
            {mayEdit && <StartDraft edition={edition.number} live={edition.live} />}
          </>
        }
      />
      {!edition.live && <Notice title="This is an older edition">Advice is given under the live one. <Link href="/rulebook" className="prose-link">Read the live edition</Link></Notice>}
      {drafts.items.length > 0 && (
        <section aria-labelledby="drafts" className="grid gap-2" data-screen-only>
          <h2 id="drafts" className="text-lg font-semibold">Drafts of the next edition</h2>
          <DraftList drafts={drafts.items} />
        </section>
      )}
      <EditionChanges key={edition.number} number={edition.number} />
      <RuleBrowser
        rules={edition.rules}
        fired={Object.fromEntries(edition.fired.map(({ rule, count }) => [rule, count]))}
        records={edition.live ? Object.fromEntries(records.items.map((record) => [record.ruleId, record])) : {}}
      />
    </Sheet>
  );
}

type MarginProps = { edition: EditionView; editions: readonly EditionSummary[]; records: Parameters<typeof RulesToMind>[0]["records"] };

function RulebookMargin({ edition, editions, records }: MarginProps) {
  return (
    <Margin>
      <MarginSection title={`Edition ${edition.number}`}>
        <MarginFacts
          facts={[
            { name: "Published", value: formatDate(edition.publishedAt) },
            { name: "Submitted by", value: edition.submittedBy?.name ?? "Saddlemark" },
            ...(edition.approvedBy === null ? [] : [{ name: "Approved by", value: edition.alone ? "nobody else: published alone" : (edition.approvedBy.name ?? "a former member") }]),
            { name: "Rules", value: edition.rules.length },
            { name: "Advice given under it", value: edition.advice },
          ]}
        />
        {edition.note !== "" && <p className="mt-2 break-words text-faint">{edition.note}</p>}
      </MarginSection>
      <MarginSection title="All editions">
        <ol className="grid gap-1">
          {editions.map((one) => (
            <li key={one.number} className="flex justify-between gap-3">
              <Link href={`/rulebook?edition=${one.number}`} aria-current={one.number === edition.number ? "page" : undefined} className="prose-link">
                Edition {one.number}{one.live ? ", live" : ""}{one.origin.startsWith("rollback:") ? `, rolls back to ${one.origin.slice("rollback:".length)}` : ""}
              </Link>
              <span className="text-faint">{formatDate(one.publishedAt)}</span>
            </li>
          ))}
        </ol>
      </MarginSection>
      {edition.live && <RulesToMind records={records} />}
      <MarginSection title="How rules act">
        <p className="text-faint">A factor multiplies the predicted time: favour by 2 halves it, disfavour by 2 doubles it. A factor of 1 gives the reason for what the model already counts. Evidence is fitted to what remains after model and rules.</p>
      </MarginSection>
    </Margin>
  );
}
