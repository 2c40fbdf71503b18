import { findRules, liveEditionNumber } from "@/db/queries/editions";
import { startReplayOf, startSearchOf, type WorkRef } from "@/db/queries/replays";
import { withSystemTeam } from "@/db/scope";
import { prepareReplay } from "@/lib/refinement/prepare-replay";
import { replayInSteps } from "@/lib/refinement/replay";
import type { RuleSet } from "@/rules/rule-schema";
import { loadRecord } from "./load-record";
import { runWork, type WorkControl } from "./run-work";

/** Shares of the bar: most of the time goes into reading the record. */
const readingShare = 0.7;

/** Replays the present contents of a draft against the live edition over the team's record, and keeps the result with the replay. */
export function runReplay({ teamId, replayId }: { teamId: string; replayId: string }): Promise<void> {
  const ref: WorkRef = { kind: "replay", teamId, id: replayId };
  return runWork(ref, async (control) => {
    const { live, draft } = await withSystemTeam(teamId, async (db) => {
      const found = await liveRules(db, teamId);
      return { live: found.rules, draft: await startReplayOf(db, ref, found.number) };
    });
    if (draft === null) throw new Error("The draft of a replay is gone.");
    const cases = await loadRecord(teamId, part(control, 0, readingShare));
    return replayInSteps(prepareReplay(cases), live, draft, part(control, readingShare, 1));
  });
}

type Database = Parameters<typeof startSearchOf>[0];

/** The live edition. Throws where a team has none: nothing can be queued for it then. */
export async function liveRules(db: Database, teamId: string): Promise<{ number: number; rules: RuleSet }> {
  const number = await liveEditionNumber(db, { teamId });
  const rules = number === null ? null : await findRules(db, { teamId }, number);
  if (number === null || rules === null) throw new Error("The team has no live edition.");
  return { number, rules };
}

/** A part of the work's progress, from one share to another. */
export function part({ onProgress, signal }: WorkControl, from: number, to: number): WorkControl {
  return { signal, onProgress: (share) => onProgress(from + (to - from) * share) };
}
