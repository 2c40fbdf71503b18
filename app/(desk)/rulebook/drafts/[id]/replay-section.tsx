"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { Play } from "lucide-react";
import { useState } from "react";
import { ReplayReport } from "@/components/rulebook/replay-report";
import { WorkProgress } from "@/components/rulebook/work-progress";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Select } from "@/components/ui/select";
import { SkeletonLines } from "@/components/ui/skeleton";
import type { DraftView } from "@/lib/api/contract/drafts";
import type { ReplaySummary, ReplayView } from "@/lib/api/contract/refinement";
import { callApi, problemText } from "@/lib/queries/call-api";
import { replayQuery, replaysQuery, rulebookKeys } from "@/lib/queries/rulebook";
import { formatDateTime } from "@/lib/shared/format-date";

type ReplaySectionProps = { draft: DraftView; mayStart: boolean; unsaved: boolean };

/** The draft over every recorded case against the live edition: start, follow, cancel, read. */
export function ReplaySection({ draft, mayStart, unsaved }: ReplaySectionProps) {
  const queryClient = useQueryClient();
  const { data: replays, error, refetch } = useQuery(replaysQuery(draft.id));
  const [chosen, setChosen] = useState<string | null>(null);
  const start = useMutation({
    mutationFn: () => callApi<ReplayView>(`/rulebook/drafts/${draft.id}/replay`, { method: "POST" }),
    onSuccess: async (replay) => {
      setChosen(replay.id);
      await queryClient.invalidateQueries({ queryKey: rulebookKeys.replays(draft.id) });
    },
  });
  const shown = chosen ?? replays?.[0]?.id ?? null;
  return (
    <div className="grid gap-6">
      <div className="flex flex-wrap items-end gap-x-6 gap-y-3">
        {mayStart && (
          <Button variant="main" disabled={start.isPending || unsaved} onClick={() => start.mutate()}><Play aria-hidden /> Replay this draft</Button>
        )}
        {replays !== undefined && replays.length > 1 && (
          <Field label="Replays kept with this draft" className="w-full max-w-md">
            <Select value={shown ?? ""} onChange={(event) => setChosen(event.target.value)}>
              {replays.map((replay) => <option key={replay.id} value={replay.id}>{replayName(replay)}</option>)}
            </Select>
          </Field>
        )}
      </div>
      {mayStart && unsaved && <p className="text-sm text-faint">Save your changes first: the draft is replayed as it was saved.</p>}
      {start.error !== null && <Notice tone="bad" announce title="The replay was not started">{problemText(start.error)}</Notice>}
      {error !== null && <Notice tone="bad" title="The replays could not be fetched" action={<Button size="small" onClick={() => void refetch()}>Try again</Button>}>{problemText(error)}</Notice>}
      {replays?.length === 0 && <p className="max-w-measure text-sm text-faint">Not replayed yet. A replay works out what this draft would have advised on every recorded case, and judges it by the runs that were made.</p>}
      {shown !== null && <ReplayShown draft={draft} id={shown} mayCancel={mayStart} />}
    </div>
  );
}

function replayName({ createdAt, draftVersion, editionNumber }: ReplaySummary): string {
  return `${formatDateTime(createdAt)}, version ${draftVersion} against edition ${editionNumber}`;
}

function ReplayShown({ draft, id, mayCancel }: { draft: DraftView; id: string; mayCancel: boolean }) {
  const queryClient = useQueryClient();
  const { data: replay, error, refetch } = useQuery(replayQuery(draft.id, id));
  const cancel = useMutation({
    mutationFn: () => callApi<ReplayView>(`/rulebook/drafts/${draft.id}/replays/${id}/cancel`, { method: "POST" }),
    onSuccess: (view) => queryClient.setQueryData(rulebookKeys.replay(draft.id, id), view),
  });
  if (error !== null) return <Notice tone="bad" title="The replay could not be fetched" action={<Button size="small" onClick={() => void refetch()}>Try again</Button>}>{problemText(error)}</Notice>;
  if (replay === undefined) return <SkeletonLines label="Loading the replay" />;
  const titles = new Map(draft.rules.map((rule) => [rule.id, rule.title]));
  const stale = replay.draftVersion !== draft.version || replay.editionNumber !== draft.live;
  return (
    <>
      <WorkProgress work={replay} label="Replay" onCancel={mayCancel ? () => cancel.mutate() : null} />
      {replay.result !== null && (
        <>
          {stale && <Notice tone="warn" title="This replay is older than the draft">It compared version {replay.draftVersion} with edition {replay.editionNumber}; now it is version {draft.version} against edition {draft.live}. Replay again.</Notice>}
          <ReplayReport result={replay.result} editionNumber={replay.editionNumber} titleOf={(ruleId) => titles.get(ruleId) ?? ruleId} />
        </>
      )}
    </>
  );
}
