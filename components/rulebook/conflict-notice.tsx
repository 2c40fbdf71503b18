"use client";

import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { diffRuleSets } from "@/lib/refinement/diff-rule-sets";
import { strategyName } from "@/lib/strategies/strategy-names";
import type { RuleSet } from "@/rules/rule-schema";
import { DifferenceList } from "./difference-list";

type ConflictNoticeProps = {
  /** Who saved when, as the server says it. */
  message: string;
  mine: RuleSet;
  /** The rules saved meanwhile; null while they are fetched. */
  theirs: RuleSet | null;
  onTakeTheirs: () => void;
  onKeepMine: () => void;
};

/** Somebody saved the draft meanwhile. Both versions are there; the person decides, and nothing is lost until they do. */
export function ConflictNotice({ message, mine, theirs, onTakeTheirs, onKeepMine }: ConflictNoticeProps) {
  return (
    <Notice
      tone="warn"
      announce
      title="Somebody saved this draft meanwhile"
      action={
        <div className="flex flex-wrap gap-2">
          <Button size="small" disabled={theirs === null} onClick={onTakeTheirs}>Take theirs; mine can be undone to</Button>
          <Button size="small" disabled={theirs === null} onClick={onKeepMine}>Keep mine, and save it over theirs</Button>
        </div>
      }
    >
      <p>{message} Your changes are still here.</p>
      {theirs !== null && (
        <details>
          <summary className="text-water underline underline-offset-3">What mine changes in theirs</summary>
          <div className="pt-3">
            <DifferenceList differences={diffRuleSets(theirs, mine, (strategy) => strategyName(strategy))} none="Nothing: both say the same." />
          </div>
        </details>
      )}
    </Notice>
  );
}
