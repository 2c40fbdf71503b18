import { runReplay } from "@/lib/use-cases/refinement/run-replay";
import type { JobPayload } from "../definitions";

/** Replays a draft; cut off in the middle, it begins anew. */
export function handleRunReplay(payload: JobPayload<"run-replay">): Promise<void> {
  return runReplay(payload);
}
