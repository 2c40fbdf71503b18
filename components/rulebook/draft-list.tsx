import Link from "next/link";
import type { DraftSummary } from "@/lib/api/contract/drafts";
import { formatDateTime } from "@/lib/shared/format-date";
import { DraftStatusBadge, draftOriginText } from "./draft-status";

/** Drafts that are not done with, the one changed last first. */
export function DraftList({ drafts }: { drafts: readonly DraftSummary[] }) {
  return (
    <ul className="grid border-t border-hairline">
      {drafts.map((draft) => (
        <li key={draft.id} className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 border-b border-hairline py-2 text-sm">
          <span className="flex min-w-0 flex-wrap items-baseline gap-x-3">
            <Link href={`/rulebook/drafts/${draft.id}`} className="prose-link font-semibold">{draft.title}</Link>
            <DraftStatusBadge status={draft.status} />
            <span className="text-faint">{draftOriginText(draft)}</span>
          </span>
          <span className="text-faint">
            version {draft.version}, {draft.updatedBy?.name ?? "a former member"}, {formatDateTime(draft.updatedAt)}
          </span>
        </li>
      ))}
    </ul>
  );
}
