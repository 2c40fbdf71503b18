import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { RevisionView } from "@/lib/api/contract/runs";
import { formatDateTime } from "@/lib/shared/format-date";

/** What a run said before each correction, who changed it and why. */
export function RunHistory({ revisions }: { revisions: readonly RevisionView[] }) {
  return (
    <Table label="Former values">
      <TableHeader>
        <TableRow>
          <TableHead>Replaced</TableHead>
          <TableHead>By</TableHead>
          <TableHead>Said before</TableHead>
          <TableHead>Why it was changed</TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        {revisions.map((revision) => (
          <TableRow key={revision.revision}>
            <TableCell className="whitespace-nowrap">{formatDateTime(revision.changedAt)}</TableCell>
            <TableCell>{revision.changedBy?.name ?? "somebody who left"}</TableCell>
            <TableCell>
              <dl className="grid grid-cols-[auto_1fr] gap-x-3">
                {Object.entries(revision.before).map(([name, value]) =>
                  value === null || value === "" || (typeof value === "object" && Object.keys(value).length === 0) ? null : (
                    <div key={name} className="contents">
                      <dt className="text-faint">{name}</dt>
                      <dd className="figures break-all">{typeof value === "object" ? JSON.stringify(value) : String(value)}</dd>
                    </div>
                  ),
                )}
              </dl>
            </TableCell>
            <TableCell>{revision.explanation === "" ? "not said" : revision.explanation}</TableCell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
