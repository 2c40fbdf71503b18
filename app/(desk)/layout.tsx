import type { ReactNode } from "react";
import { PersonMenu } from "@/components/team/person-menu";
import { TeamSwitcher } from "@/components/team/team-switcher";
import { DeskShell } from "@/components/layout/desk-shell";
import { currentPerson, requireActor } from "@/lib/auth/actor";
import { signOutAction } from "../(public)/actions";
import { DeskFind } from "./desk-find";
import { switchTeamAction } from "./team/actions";

const destinations = [
  { label: "Cases", href: "/cases" },
  { label: "Hit rates", href: "/hit-rates" },
  { label: "Rulebook", href: "/rulebook" },
] as const;

/** The frame of every signed-in page. The pages check the actor themselves: a layout is not run again on each change of page. */
export default async function DeskLayout({ children }: { children: ReactNode }) {
  const actor = await requireActor();
  const teams = (await currentPerson())?.teams ?? [];
  const active = teams.find(({ teamId }) => teamId === actor.teamId);
  return (
    <DeskShell
      destinations={destinations}
      teams={<TeamSwitcher teams={teams.map(({ teamId, teamName }) => ({ id: teamId, name: teamName }))} activeId={actor.teamId} action={switchTeamAction} />}
      find={<DeskFind />}
      person={<PersonMenu name={actor.userName} email={actor.userEmail} role={actor.role} signOut={signOutAction} />}
      demonstration={active?.demonstration ?? false}
    >
      {children}
    </DeskShell>
  );
}
