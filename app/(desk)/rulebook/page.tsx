import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginFacts, MarginSection, Sheet } from "@/components/layout/sheet";
import { RuleEntry } from "@/components/rulebook/rule-entry";
import { Notice } from "@/components/ui/notice";
import { requireActor } from "@/lib/auth/actor";
import { AppError } from "@/lib/shared/app-error";
import { formatDate } from "@/lib/shared/format-date";
import { getEdition } from "@/lib/use-cases/rulebook/get-edition";
import { readHitRates } from "@/lib/use-cases/hit-rates/read-hit-rates";
import { listEditions } from "@/lib/use-cases/rulebook/list-editions";
import { RuleRecord } from "@/components/rulebook/rule-record";

export const metadata: Metadata = { title: "Rulebook" };

/** The live edition, or the one named by `?edition=`, rule by rule with its record. */
export default async function RulebookPage({ searchParams }: { searchParams: Promise<{ edition?: string | string[] }> }) {
  const actor = await requireActor();
  const { edition: asked = "live" } = await searchParams;
  const [edition, editions, rates] = await Promise.all([
    getEdition(actor, { number: asked === "live" ? asked : Number(asked) }).catch((error: unknown) => {
      if (error instanceof AppError && (error.code === "not-found" || error.code === "invalid")) notFound();
      throw error;
    }),
    listEditions(actor, { limit: 200 }),
    readHitRates(actor, {}),
  ]);
  const fired = new Map(edition.fired.map((entry) => [entry.rule, entry.count]));
  const groups = new Map(rates.groups.filter((group) => group.by === "rule").map((group) => [group.key, group]));
  return (
    <Sheet
      margin={
        <Margin>
          <MarginSection title={`Edition ${edition.number}`}>
            <MarginFacts
              facts={[
                { name: "Published", value: formatDate(edition.publishedAt) },
                { name: "By", value: edition.submittedBy?.name ?? "Saddlemark" },
                { name: "Rules", value: edition.rules.length },
                { name: "Advice given under it", value: edition.advice },
              ]}
            />
            {edition.note !== "" && <p className="mt-2 text-faint">{edition.note}</p>}
          </MarginSection>
          <MarginSection title="All editions">
            <ol className="grid gap-1">
              {editions.items.map((one) => (
                <li key={one.number} className="flex justify-between gap-3">
                  <Link href={`/rulebook?edition=${one.number}`} aria-current={one.number === edition.number ? "page" : undefined} className="prose-link">
                    Edition {one.number}{one.live ? ", live" : ""}
                  </Link>
                  <span className="text-faint">{formatDate(one.publishedAt)}</span>
                </li>
              ))}
            </ol>
          </MarginSection>
          <MarginSection title="How rules act">
            <p className="text-faint">A factor multiplies the predicted time: favour by 2 halves it, disfavour by 2 doubles it. A factor of 1 gives the reason for what the model already counts. Evidence is fitted to what remains after model and rules.</p>
          </MarginSection>
        </Margin>
      }
    >
      <PageTitle title="Rulebook" above={<span className="text-sm text-faint">Edition {edition.number}{edition.live ? ", live" : ", not live"}</span>} below="Who may compete, with which parameters, with which warning and fall-back." />
      {!edition.live && <Notice title="This is an older edition">Advice is given under the live one. <Link href="/rulebook" className="prose-link">Read the live edition</Link></Notice>}
      <div>
        {edition.rules.map((rule) => (
          <RuleEntry key={rule.id} rule={rule} record={<RuleRecord fired={fired.get(rule.id) ?? 0} group={groups.get(rule.id) ?? null} />} />
        ))}
      </div>
    </Sheet>
  );
}
