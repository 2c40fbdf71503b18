import { Badge } from "@/components/ui/badge";
import type { FindingView } from "@/lib/api/contract/findings";

const severityLooks: Record<FindingView["severity"], { word: string; tone: "bad" | "warn" | "water" | "faint" }> = {
  failure: { word: "failure", tone: "bad" },
  risk: { word: "risk", tone: "warn" },
  waste: { word: "waste", tone: "water" },
  note: { word: "note", tone: "faint" },
};

/** What is conspicuous about a run, the gravest first: what was seen, what to try next and why, where that is known from. */
export function FindingList({ findings }: { findings: readonly FindingView[] }) {
  return (
    <ul className="grid gap-3">
      {findings.map((finding) => (
        <li key={finding.id} className="grid gap-1 border-l-2 border-contour pl-3 text-sm">
          <p className="flex flex-wrap items-center gap-2 font-semibold">
            <Badge tone={severityLooks[finding.severity].tone}>{severityLooks[finding.severity].word}</Badge> {finding.title}
          </p>
          <p>
            {finding.text}
            {finding.lines.length > 0 && <span className="text-faint"> Log line {finding.lines.join(", ")}.</span>}
          </p>
          <p><span className="font-medium">Try next:</span> {finding.whatToTry}</p>
          <p className="text-xs text-faint">{finding.source.citation}</p>
        </li>
      ))}
    </ul>
  );
}
