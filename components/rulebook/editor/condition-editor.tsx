"use client";

import { FolderPlus, Plus, Trash2 } from "lucide-react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/select";
import type { Condition } from "@/rules/rule-schema";
import { ComparisonEditor } from "./comparison-editor";
import { blankComparison, conditionOf, groupKinds, groupLabels, groupOf, memberPath, type Group, type GroupKind } from "./condition-groups";
import { ProblemsAt } from "./rule-problems";

type ConditionEditorProps = { condition: Condition; path: string; onChange: (condition: Condition, merge?: string) => void; /** Null where the condition must stay. */ onRemove: (() => void) | null };

/** A condition of any depth: a comparison, or a group of conditions. */
export function ConditionEditor({ condition, path, onChange, onRemove }: ConditionEditorProps) {
  if ("fact" in condition) {
    return (
      <div className="grid gap-2">
        <div className="flex items-start gap-2">
          <div className="min-w-0 grow">
            <ComparisonEditor comparison={condition} path={path} onChange={onChange} />
          </div>
          {onRemove !== null && <RemoveButton label="Remove this condition" onRemove={onRemove} />}
        </div>
        <ProblemsAt path={path} errorsToo />
        {onRemove === null && (
          <div>
            <Button size="small" variant="quiet" onClick={() => onChange({ all: [condition, blankComparison] })}>
              <Plus aria-hidden /> And another condition
            </Button>
          </div>
        )}
      </div>
    );
  }
  return <GroupEditor group={groupOf(condition)} path={path} onChange={onChange} onRemove={onRemove} />;
}

type GroupEditorProps = { group: Group; path: string; onChange: (condition: Condition, merge?: string) => void; onRemove: (() => void) | null };

function GroupEditor({ group, path, onChange, onRemove }: GroupEditorProps) {
  const { kind, members } = group;
  const setMembers = (next: Condition[], merge?: string) => onChange(conditionOf({ kind, members: next }), merge);
  const add = (member: Condition) => setMembers([...members, member]);
  return (
    <div role="group" aria-label={`Group: ${groupLabels[kind]}`} className="grid min-w-0 gap-3 border-l-2 border-contour pl-3 sm:pl-4">
      <div className="flex flex-wrap items-center gap-2">
        <span className="w-64 max-w-full">
          <KindSelect kind={kind} single={members.length === 1} onChange={(next) => onChange(conditionOf({ kind: next, members }))} />
        </span>
        {onRemove !== null && <RemoveButton label="Remove this group" onRemove={onRemove} />}
      </div>
      <ProblemsAt path={path} errorsToo />
      {members.map((member, index) => (
        <ConditionEditor
          key={index}
          condition={member}
          path={`${path}.${memberPath(kind, index)}`}
          onChange={(next, merge) => setMembers(members.with(index, next), merge)}
          onRemove={members.length === 1 ? null : () => setMembers(members.toSpliced(index, 1))}
        />
      ))}
      <div className="flex flex-wrap gap-2">
        <Button size="small" variant="quiet" onClick={() => add(blankComparison)}>
          <Plus aria-hidden /> Condition
        </Button>
        <Button size="small" variant="quiet" onClick={() => add({ any: [blankComparison] })}>
          <FolderPlus aria-hidden /> Group
        </Button>
      </div>
    </div>
  );
}

function KindSelect({ kind, single, onChange }: { kind: GroupKind; single: boolean; onChange: (kind: GroupKind) => void }) {
  return (
    <Select
      aria-label="How the conditions are joined"
      value={kind}
      onChange={(event) => {
        const next = groupKinds.find((known) => known === event.target.value);
        if (next !== undefined) onChange(next);
      }}
    >
      {groupKinds.map((known) => (known === "not" && !single ? null : <option key={known} value={known}>{groupLabels[known]}</option>))}
    </Select>
  );
}

function RemoveButton({ label, onRemove }: { label: string; onRemove: () => void }) {
  return (
    <Button size="icon" variant="quiet" aria-label={label} title={label} onClick={onRemove}>
      <Trash2 aria-hidden />
    </Button>
  );
}
