import { claimWork, failWork, finishWork, noteProgress, type WorkRef } from "@/db/queries/replays";
import { withSystemTeam } from "@/db/scope";

export type WorkControl = { onProgress: (share: number) => void; signal: AbortSignal };

const notePauseMilliseconds = 400;

/** Why work is let go of when its row says cancelled. */
class NoLongerWanted extends Error {}

/**
 * Does background work whose row says how far it is: takes it up (anew after a worker was cut off), notes its progress, stops at its next
 * step when it was cancelled, keeps its result. Work that fails is marked so, and the failure is thrown on to the queue's log.
 */
export async function runWork(ref: WorkRef, work: (control: WorkControl) => Promise<unknown>): Promise<void> {
  if (!(await withSystemTeam(ref.teamId, (db) => claimWork(db, ref)))) return;
  const ending = new AbortController();
  let share = 0;
  const watch = watchWork(ref, () => share, ending);
  try {
    const result = await work({ signal: ending.signal, onProgress: (done) => (share = Math.max(share, done)) });
    await withSystemTeam(ref.teamId, (db) => finishWork(db, ref, result));
  } catch (error) {
    if (error instanceof NoLongerWanted) return;
    await withSystemTeam(ref.teamId, (db) => failWork(db, ref, "It broke off. Start it again; if it breaks off again, tell whoever runs this installation."));
    throw error;
  } finally {
    await watch.stop();
  }
}

/** Notes the share done now and then; ends the work when its row is no longer running. A database that is away is asked again later. */
function watchWork(ref: WorkRef, share: () => number, ending: AbortController): { stop: () => Promise<void> } {
  let asking: Promise<void> = Promise.resolve();
  let busy = false;
  const ask = async () => {
    busy = true;
    try {
      const wanted = await withSystemTeam(ref.teamId, (db) => noteProgress(db, ref, share()));
      if (!wanted) ending.abort(new NoLongerWanted("cancelled"));
    } catch (error) {
      console.error(`${ref.kind} ${ref.id}: progress not noted: ${error instanceof Error ? error.name : typeof error}`);
    } finally {
      busy = false;
    }
  };
  const timer = setInterval(() => {
    if (!busy) asking = ask();
  }, notePauseMilliseconds);
  return {
    stop: async () => {
      clearInterval(timer);
      await asking;
    },
  };
}
