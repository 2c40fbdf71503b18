"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { Search } from "lucide-react";
import Link from "next/link";
import { EmptyState } from "@/components/layout/empty-state";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginFacts, MarginSection, Sheet } from "@/components/layout/sheet";
import { ProposalCard } from "@/components/rulebook/proposal-card";
import { WorkProgress } from "@/components/rulebook/work-progress";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SkeletonLines } from "@/components/ui/skeleton";
import type { SearchView } from "@/lib/api/contract/refinement";
import { callApi, problemText } from "@/lib/queries/call-api";
import { rulebookKeys, searchesQuery, searchQuery } from "@/lib/queries/rulebook";
import { formatCount, formatPercent } from "@/lib/shared/format";
import { formatDateTime } from "@/lib/shared/format-date";
import { useStartDraft } from "../start-draft";

/** Refinements that the team's own record can defend; each becomes a draft by one click, and nothing else by itself. */
export function ProposalDesk({ mayEdit }: { mayEdit: boolean }) {
  const queryClient = useQueryClient();
  const { data: searches, error, refetch } = useQuery(searchesQuery());
  const start = useMutation({
    mutationFn: () => callApi<SearchView>("/rulebook/proposals", { method: "POST" }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: rulebookKeys.searches }),
  });
  const [latest] = searches ?? [];
  const { data: current = latest } = useQuery({ ...searchQuery(latest?.id ?? ""), enabled: latest !== undefined });
  const startButton = mayEdit && (
    <Button variant="main" disabled={start.isPending || current?.status === "queued" || current?.status === "running"} onClick={() => start.mutate()}><Search aria-hidden /> Search the record</Button>
  );
  return (
    <Sheet margin={<SearchMargin id={latest?.id ?? null} />}>
      <PageTitle
        above={<Link href="/rulebook" className="prose-link text-sm">Rulebook</Link>}
        title="Proposals"
        below="Changes of the live rules that the team's own runs can defend. Nothing is applied by itself: a proposal becomes a draft."
        actions={latest !== undefined && startButton}
      />
      {start.error !== null && <Notice tone="bad" announce title="The search was not started">{problemText(start.error)}</Notice>}
      {error !== null ? (
        <Notice tone="bad" title="The searches could not be fetched" action={<Button size="small" onClick={() => void refetch()}>Try again</Button>}>{problemText(error)}</Notice>
      ) : searches === undefined ? (
        <SkeletonLines label="Loading the proposals" />
      ) : latest === undefined ? (
        <EmptyState title="Not searched yet" text={mayEdit ? "Let the product search the record for thresholds, factors and rules that the runs speak against." : "A curator or an owner can search the record for refinements."} action={startButton || undefined} />
      ) : (
        <SearchShown key={latest.id} id={latest.id} mayEdit={mayEdit} />
      )}
    </Sheet>
  );
}

function SearchShown({ id, mayEdit }: { id: string; mayEdit: boolean }) {
  const queryClient = useQueryClient();
  const { data: search, error, refetch } = useQuery(searchQuery(id));
  const draft = useStartDraft();
  const cancel = useMutation({
    mutationFn: () => callApi<SearchView>(`/rulebook/proposals/${id}/cancel`, { method: "POST" }),
    onSuccess: async (view) => {
      queryClient.setQueryData(rulebookKeys.search(id), view);
      await queryClient.invalidateQueries({ queryKey: rulebookKeys.searches, exact: true });
    },
  });
  if (error !== null) return <Notice tone="bad" title="The search could not be fetched" action={<Button size="small" onClick={() => void refetch()}>Try again</Button>}>{problemText(error)}</Notice>;
  if (search === undefined) return <SkeletonLines label="Loading the search" />;
  const { result } = search;
  return (
    <>
      <WorkProgress work={search} label="Search" onCancel={mayEdit ? () => cancel.mutate() : null} />
      {draft.error !== null && <Notice tone="bad" announce title="No draft was made">{problemText(draft.error)}</Notice>}
      {result !== null && (
        <section aria-labelledby="found" className="grid gap-2">
          <h2 id="found" className="text-lg font-semibold">{result.proposals.length === 0 ? "Nothing to propose" : `${result.proposals.length} that the record can defend`}</h2>
          <p className="max-w-measure text-sm">{result.text}</p>
          {result.enough && result.proposals.length === 0 && <p className="pt-3 text-sm text-faint">The live rules stand as far as the record can tell. More contested cases let smaller effects show.</p>}
          {result.proposals.map((proposal) => (
            <ProposalCard
              key={proposal.key}
              proposal={proposal}
              rival={result.proposals.find(({ key }) => key === proposal.sameCasesAs)?.words ?? null}
              busy={draft.isPending}
              onDraft={mayEdit ? () => draft.mutate({ from: "proposal", search: id, key: proposal.key }) : null}
            />
          ))}
        </section>
      )}
    </>
  );
}

function SearchMargin({ id }: { id: string | null }) {
  const { data: search } = useQuery({ ...searchQuery(id ?? ""), enabled: id !== null });
  return (
    <Margin>
      {search !== undefined && (
        <MarginSection title="This search">
          <MarginFacts
            facts={[
              { name: "Started", value: formatDateTime(search.createdAt) },
              { name: "Edition searched", value: search.editionNumber },
              ...(search.result === null
                ? []
                : [
                    { name: "Cases", value: formatCount(search.result.cases) },
                    { name: "Contested", value: formatCount(search.result.contestedCases) },
                    { name: "Needed", value: formatCount(search.result.leastContestedCases) },
                    { name: "Candidates tried", value: formatCount(search.result.candidates) },
                    { name: "Level", value: formatPercent(search.result.level) },
                  ]),
            ]}
          />
        </MarginSection>
      )}
      <MarginSection title="What counts as evidence">
        <p className="text-faint">A change is proposed when it saves time on cases that had no say in choosing it, and more than the best of all candidates would save by chance. Only cases where the first choice was compared with another strategy can tell.</p>
      </MarginSection>
    </Margin>
  );
}
