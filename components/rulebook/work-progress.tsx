import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { ReplaySummary, SearchSummary, WorkStatus } from "@/lib/api/contract/refinement";
import { formatPercent } from "@/lib/shared/format";

const words: Record<WorkStatus, string> = { queued: "Waiting for the worker", running: "Running", done: "Done", failed: "Broke off", cancelled: "Cancelled" };

type WorkProgressProps = { work: ReplaySummary | SearchSummary; label: string; onCancel: (() => void) | null };

/** How far work in the background is, with a way to stop it; nothing once it is done. */
export function WorkProgress({ work, label, onCancel }: WorkProgressProps) {
  if (work.status === "done") return null;
  if (work.status === "failed") return <Notice tone="bad" title={`${label} broke off`}>{work.failure}</Notice>;
  if (work.status === "cancelled") return <Notice title={`${label} was cancelled`} />;
  return (
    <div className="grid gap-2 border border-hairline px-4 py-3" role="status">
      <p className="flex flex-wrap items-baseline justify-between gap-3 text-sm">
        <span className="font-semibold">{label}: {words[work.status].toLowerCase()}</span>
        <span className="figures text-faint">{formatPercent(work.progress)}</span>
      </p>
      <progress aria-label={label} value={work.progress} max={1} className="h-2 w-full accent-[var(--water)]" />
      <p className="text-sm text-faint">You can leave this page; the result is kept.</p>
      {onCancel !== null && (
        <div>
          <Button size="small" onClick={onCancel}>Cancel</Button>
        </div>
      )}
    </div>
  );
}
