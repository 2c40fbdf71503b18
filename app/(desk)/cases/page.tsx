import type { Metadata } from "next";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { readTeam } from "@/lib/use-cases/team/read-team";
import { CaseList } from "./case-list";

export const metadata: Metadata = { title: "Cases" };

/** All cases of the team; filters, search and sort stand in the address. */
export default async function CasesPage() {
  const actor = await requireActor();
  const team = await readTeam(actor, {});
  return <CaseList mayWrite={mayRole(actor.role, "cases:write")} authors={team.members.map((member) => ({ id: member.userId, name: member.name }))} />;
}
