"use client";

import { ArrowDown, ArrowUp, CircleAlert, Copy, Plus, Redo2, Trash2, TriangleAlert, Undo2, type LucideIcon } from "lucide-react";
import { useDeferredValue, useState, type KeyboardEvent } from "react";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { cn } from "@/components/ui/cn";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import type { RuleSet } from "@/rules/rule-schema";
import type { RuleProblem } from "./rule-problems";

export const listActions = ["add", "copy", "delete", "up", "down", "undo", "redo"] as const;
export type ListAction = (typeof listActions)[number];

type RuleListProps = {
  rules: RuleSet;
  selected: number;
  problems: readonly RuleProblem[];
  /** Actions that are possible now; none for readers. */
  possible: ReadonlySet<ListAction>;
  onSelect: (index: number) => void;
  onAction: (action: ListAction) => void;
};

const looks: Record<ListAction, { icon: LucideIcon; label: string }> = {
  add: { icon: Plus, label: "Add a rule" },
  copy: { icon: Copy, label: "Copy this rule" },
  delete: { icon: Trash2, label: "Delete this rule" },
  up: { icon: ArrowUp, label: "Read this rule earlier" },
  down: { icon: ArrowDown, label: "Read this rule later" },
  undo: { icon: Undo2, label: "Undo" },
  redo: { icon: Redo2, label: "Redo" },
};

/** The rules in the order in which they are read, with a filter. Alt with an arrow key moves the chosen one. */
export function RuleList({ rules, selected, problems, possible, onSelect, onAction }: RuleListProps) {
  const [filter, setFilter] = useState("");
  const wanted = useDeferredValue(filter.trim().toLowerCase());
  const counts = countBySeverity(problems);
  const shown = rules.map((rule, index) => ({ rule, index })).filter(({ rule }) => wanted === "" || `${rule.title} ${rule.id}`.toLowerCase().includes(wanted));
  function onKeyDown(event: KeyboardEvent): void {
    if (!event.altKey || (event.key !== "ArrowUp" && event.key !== "ArrowDown")) return;
    event.preventDefault();
    const action = event.key === "ArrowUp" ? "up" : "down";
    if (possible.has(action)) onAction(action);
  }
  return (
    <div className="grid min-w-0 content-start gap-3">
      {possible.size > 0 && (
        <div role="toolbar" aria-label="Rules" className="flex flex-wrap gap-1">
          {listActions.map((action) => {
            const { icon: Icon, label } = looks[action];
            return (
              <Button key={action} size="icon" variant={action === "add" ? "plain" : "quiet"} aria-label={label} title={label} disabled={!possible.has(action)} onClick={() => onAction(action)}>
                <Icon aria-hidden />
              </Button>
            );
          })}
        </div>
      )}
      <Field label="Find a rule">
        <Input type="search" value={filter} onChange={(event) => setFilter(event.target.value)} />
      </Field>
      <p className="text-xs text-faint" aria-live="polite">{shown.length === rules.length ? `${rules.length} rules` : `${shown.length} of ${rules.length} rules`}</p>
      <ol className="grid max-h-72 content-start overflow-y-auto border border-hairline lg:max-h-[70dvh]" onKeyDown={onKeyDown}>
        {shown.map(({ rule, index }) => (
          <li key={`${index}-${rule.id}`} className="border-b border-hairline last:border-b-0">
            <button
              type="button"
              aria-current={index === selected ? "true" : undefined}
              onClick={() => onSelect(index)}
              className={cn("flex w-full items-baseline gap-2 px-2.5 py-2 text-left text-sm hover:bg-wash", index === selected && "border-l-4 border-l-peg bg-wash font-semibold")}
            >
              <span className="figures w-6 shrink-0 text-right text-xs text-faint">{index + 1}</span>
              <span className="min-w-0 grow">{rule.title === "" ? rule.id : rule.title}</span>
              {!rule.enabled && <Badge tone="faint">off</Badge>}
              <Count icon={CircleAlert} count={counts.error.get(index) ?? 0} word="error" classes="text-bad" />
              <Count icon={TriangleAlert} count={counts.warning.get(index) ?? 0} word="warning" classes="text-warn" />
            </button>
          </li>
        ))}
        {shown.length === 0 && <li className="px-3 py-4 text-sm text-faint">{rules.length === 0 ? "No rule yet. Add the first one." : "No rule of this name."}</li>}
      </ol>
    </div>
  );
}

function Count({ icon: Icon, count, word, classes }: { icon: LucideIcon; count: number; word: string; classes: string }) {
  if (count === 0) return null;
  const text = `${count} ${word}${count === 1 ? "" : "s"}`;
  return (
    <span className={cn("inline-flex shrink-0 items-center self-center", classes)} title={text}>
      <Icon aria-hidden className="size-4" />
      <span className="sr-only">{text}</span>
    </span>
  );
}

function countBySeverity(problems: readonly RuleProblem[]): Record<"error" | "warning", Map<number, number>> {
  const counts = { error: new Map<number, number>(), warning: new Map<number, number>() };
  for (const { path, severity } of problems) {
    const index = Number.parseInt(path, 10);
    if (severity === "note" || Number.isNaN(index)) continue;
    counts[severity].set(index, (counts[severity].get(index) ?? 0) + 1);
  }
  return counts;
}
