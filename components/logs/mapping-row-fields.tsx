"use client";

import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { SegmentedControl } from "@/components/ui/segmented-control";
import { Select } from "@/components/ui/select";
import { columnDelimiters, mappingChoices, type MappedQuantity } from "@/lib/logs/mapping";
import type { MappingRow } from "./mapping-draft";

type MappingRowFieldsProps = { row: MappingRow; free: readonly MappedQuantity[]; error: string | undefined; onChange: (row: MappingRow) => void; onRemove: (() => void) | null };

const quantityWords: Record<MappedQuantity, string> = {
  iterations: "Iterations",
  processes: "Processes",
  setupSeconds: "Set-up time, s",
  solveSeconds: "Time of one solve, s",
  peakMemoryGiB: "Peak memory, GiB",
  trueRelativeResidual: "True relative residual",
  monitoredRelativeResidual: "Monitored relative residual",
  factorEntries: "Factor entries",
  residual: "Residual, each iteration",
  trueResidual: "True residual, each iteration",
};

const choiceWords: Record<(typeof mappingChoices)[number], string> = { only: "the only one", first: "the first", last: "the last" };

/** Where one quantity stands in a log. */
export function MappingRowFields({ row, free, error, onChange, onRemove }: MappingRowFieldsProps) {
  const known = <Member extends string>(members: readonly Member[], text: string, apply: (member: Member) => void) => {
    const member = members.find((one) => one === text);
    if (member !== undefined) apply(member);
  };
  return (
    <div className="grid items-start gap-x-4 gap-y-3 border-b border-hairline pb-4 sm:grid-cols-4">
      <Field label="Quantity">
        <Select value={row.quantity} onChange={(event) => known(free, event.target.value, (quantity) => onChange({ ...row, quantity }))}>
          {free.map((quantity) => <option key={quantity} value={quantity}>{quantityWords[quantity]}</option>)}
        </Select>
      </Field>
      <SegmentedControl
        legend="Found by"
        options={[{ value: "pattern", label: "pattern" }, { value: "column", label: "column" }]}
        value={row.by}
        onValueChange={(by) => onChange({ ...row, by })}
      />
      <Field label="Of several lines">
        <Select value={row.take} onChange={(event) => known(mappingChoices, event.target.value, (take) => onChange({ ...row, take }))}>
          {mappingChoices.map((choice) => <option key={choice} value={choice}>{choiceWords[choice]}</option>)}
        </Select>
      </Field>
      <Field label="Multiplied by" help="0.001 for ms.">
        <Input inputMode="decimal" autoComplete="off" value={row.scale} onChange={(event) => onChange({ ...row, scale: event.target.value })} />
      </Field>
      {row.by === "pattern" ? (
        <Field label="Pattern" error={error} className="sm:col-span-3">
          <Input className="font-mono" spellCheck={false} autoComplete="off" value={row.pattern} onChange={(event) => onChange({ ...row, pattern: event.target.value })} />
        </Field>
      ) : (
        <>
          <Field label="Columns parted by">
            <Select value={row.delimiter} onChange={(event) => known(columnDelimiters, event.target.value, (delimiter) => onChange({ ...row, delimiter }))}>
              {columnDelimiters.map((delimiter) => <option key={delimiter} value={delimiter}>{delimiter}</option>)}
            </Select>
          </Field>
          <Field label="Column number" error={error}>
            <Input inputMode="numeric" autoComplete="off" value={row.index} onChange={(event) => onChange({ ...row, index: event.target.value })} />
          </Field>
          <Field label="In lines with the text">
            <Input autoComplete="off" value={row.contains} onChange={(event) => onChange({ ...row, contains: event.target.value })} />
          </Field>
        </>
      )}
      {onRemove !== null && (
        <div className="self-end">
          <Button size="small" variant="quiet" onClick={onRemove}>Remove</Button>
        </div>
      )}
    </div>
  );
}
