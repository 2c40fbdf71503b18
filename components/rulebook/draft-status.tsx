import { Badge } from "@/components/ui/badge";
import type { DraftStatus, DraftSummary } from "@/lib/api/contract/drafts";

const looks: Record<DraftStatus, { word: string; tone: "water" | "peg" | "forest" | "faint" }> = {
  open: { word: "open", tone: "water" },
  submitted: { word: "waits for approval", tone: "peg" },
  published: { word: "published", tone: "forest" },
  discarded: { word: "discarded", tone: "faint" },
};

/** A word on how far a draft is. */
export function DraftStatusBadge({ status }: { status: DraftStatus }) {
  return <Badge tone={looks[status].tone}>{looks[status].word}</Badge>;
}

/** Where a draft's rules come from, in words. */
export function draftOriginText({ origin, basedOn }: Pick<DraftSummary, "origin" | "basedOn">): string {
  if (origin === "import") return "from an imported file";
  const rollback = /^rollback:(\d+)$/.exec(origin)?.[1];
  if (rollback !== undefined) return `the rules of edition ${rollback}`;
  return origin.startsWith("proposal:") ? `from a proposal on edition ${basedOn}` : `from edition ${basedOn}`;
}
