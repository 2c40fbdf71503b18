import { randomBytes } from "node:crypto";
import { recordAudit } from "@/db/queries/record-audit";
import { addMember, insertTeam } from "@/db/queries/team-members";
import { withTeamAccounts } from "@/db/scope";
import { enqueue } from "@/lib/jobs/queue";
import { newId } from "./new-id";
import { prepareTeam } from "./prepare-team";

export type NewTeam = { ownerId: string; name: string; demonstration?: boolean };

/**
 * Makes a team with its owner and its first contents. The team, its owner, the audit row and the order to prepare it are one
 * transaction; the contents are another, by another database role, and the job makes up for it if this process dies between.
 */
export async function makeTeam({ ownerId, name, demonstration = false }: NewTeam): Promise<{ teamId: string }> {
  const teamId = newId();
  await withTeamAccounts(teamId, async (db) => {
    await insertTeam(db, { id: teamId, name, slug: slugOf(name), demonstration });
    await addMember(db, { id: newId(), teamId, userId: ownerId, role: "owner" });
    await recordAudit(db, { teamId, actorId: ownerId, action: "team.made", subjectKind: "team", subjectId: teamId, detail: { name } });
    await enqueue(db, "prepare-team", { teamId, ownerId });
  });
  await prepareTeam({ teamId, ownerId });
  return { teamId };
}

/** Readable, and unique by its random end. */
function slugOf(name: string): string {
  const words = name.toLowerCase().normalize("NFKD").replaceAll(/[^a-z0-9]+/g, "-").replaceAll(/^-+|-+$/g, "");
  return `${words.slice(0, 40) || "team"}-${randomBytes(4).toString("hex")}`;
}
