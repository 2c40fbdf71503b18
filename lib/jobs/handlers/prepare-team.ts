import { prepareTeam } from "@/lib/use-cases/team/prepare-team";
import type { JobPayload } from "../definitions";

/** Makes up for a team whose first contents were not stored when it was made. */
export async function handlePrepareTeam(team: JobPayload<"prepare-team">): Promise<void> {
  await prepareTeam(team);
}
