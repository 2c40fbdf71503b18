"use client";

import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { mappedQuantities, type LogMapping } from "@/lib/logs/mapping";
import { MappingRowFields } from "./mapping-row-fields";
import { emptyDraft, emptyRow, tryMapping, type MappingDraft, type MappingRow } from "./mapping-draft";
import { UnderstoodTable } from "./understood-table";

type MappingEditorProps = { /** Beginning of the log, on which the format is tried as it is typed. */ sample: string; saving: boolean; refusal: string | null; onSave: (mapping: LogMapping) => void; onCancel: () => void };

/** A log format of the team's own: a pattern or a column for each quantity, tried at once. */
export function MappingEditor({ sample, saving, refusal, onSave, onCancel }: MappingEditorProps) {
  const [draft, setDraft] = useState<MappingDraft>(emptyDraft);
  const tried = useMemo(() => tryMapping(draft, sample), [draft, sample]);
  const errors = "errors" in tried ? tried.errors : [];
  const used = new Set(draft.rows.map(({ quantity }) => quantity));
  const next = mappedQuantities.find((quantity) => !used.has(quantity));
  const errorOf = (path: string) => errors.find((error) => error.path === path || error.path.startsWith(`${path}.`))?.message;
  const setRow = (index: number, row: MappingRow) => setDraft({ ...draft, rows: draft.rows.map((one, at) => (at === index ? row : one)) });

  return (
    <section aria-label="New log format" className="grid gap-4 border border-hairline p-4">
      <p className="text-sm text-faint">
        A pattern is a regular expression with one group around the number, such as <code className="font-mono text-xs">took (\d+) steps</code>. Every line is looked at on its own.
      </p>
      <Field label="Name of the format" error={draft.name === "" ? undefined : errorOf("name")} required>
        <Input autoComplete="off" value={draft.name} onChange={(event) => setDraft({ ...draft, name: event.target.value })} />
      </Field>
      {draft.rows.map((row, index) => (
        <MappingRowFields
          key={row.quantity}
          row={row}
          free={mappedQuantities.filter((quantity) => quantity === row.quantity || !used.has(quantity))}
          error={row.by === "pattern" && row.pattern === "" ? undefined : errorOf(`quantities.${row.quantity}`)}
          onChange={(changed) => setRow(index, changed)}
          onRemove={draft.rows.length > 1 ? () => setDraft({ ...draft, rows: draft.rows.filter((_, at) => at !== index) }) : null}
        />
      ))}
      {next !== undefined && (
        <div>
          <Button size="small" onClick={() => setDraft({ ...draft, rows: [...draft.rows, emptyRow(next)] })}>Add a quantity</Button>
        </div>
      )}
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Text of a converged run" help="If a line holds it, the run converged.">
          <Input autoComplete="off" value={draft.converged} onChange={(event) => setDraft({ ...draft, converged: event.target.value })} />
        </Field>
        <Field label="Text of a failed run" help="If a line holds it, the run diverged.">
          <Input autoComplete="off" value={draft.failed} onChange={(event) => setDraft({ ...draft, failed: event.target.value })} />
        </Field>
      </div>
      <div aria-live="polite">
        {"parsed" in tried ? <UnderstoodTable parsed={tried.parsed} lineTexts={{}} /> : <p className="text-sm text-faint">Complete the format and it is tried on the log at once.</p>}
      </div>
      {refusal !== null && <Notice tone="bad" title="The format was not saved" announce>{refusal}</Notice>}
      <div className="flex flex-wrap gap-2">
        <Button disabled={saving || !("mapping" in tried)} onClick={() => "mapping" in tried && onSave(tried.mapping)}>{saving ? "Saving" : "Save the format and read the log"}</Button>
        <Button variant="quiet" onClick={onCancel}>Cancel</Button>
      </div>
    </section>
  );
}
