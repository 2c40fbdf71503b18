import { startSearchOf, type WorkRef } from "@/db/queries/replays";
import { withSystemTeam } from "@/db/scope";
import { prepareReplay } from "@/lib/refinement/prepare-replay";
import { searchProposals } from "@/lib/refinement/proposals";
import { loadRecord } from "./load-record";
import { liveRules, part } from "./run-replay";
import { runWork } from "./run-work";

const readingShare = 0.3;

/** Fixed, so that the same record and edition give the same proposals. */
const seed = 20_261_201;

/** Searches the team's record for refinements of the live edition and keeps what it found. Nothing is applied. */
export function runSearch({ teamId, searchId }: { teamId: string; searchId: string }): Promise<void> {
  const ref: WorkRef = { kind: "search", teamId, id: searchId };
  return runWork(ref, async (control) => {
    const { rules } = await withSystemTeam(teamId, async (db) => {
      const found = await liveRules(db, teamId);
      await startSearchOf(db, ref, found.number);
      return found;
    });
    const cases = await loadRecord(teamId, part(control, 0, readingShare));
    return searchProposals(prepareReplay(cases), rules, { seed, ...part(control, readingShare, 1) });
  });
}
