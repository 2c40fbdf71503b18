import type { Metadata } from "next";
import { InviteForm } from "@/components/team/invite-form";
import { InvitationTable } from "@/components/team/invitation-table";
import { KeyForm } from "@/components/team/key-form";
import { KeyTable } from "@/components/team/key-table";
import { LeaveTeam } from "@/components/team/leave-team";
import { MemberTable } from "@/components/team/member-table";
import { RoleTable } from "@/components/team/role-table";
import { PageTitle } from "@/components/layout/page-title";
import { Margin, MarginSection, Sheet } from "@/components/layout/sheet";
import { requireActor } from "@/lib/auth/actor";
import { readTeam } from "@/lib/use-cases/team/read-team";
import { changeRoleAction, createKeyAction, inviteAction, leaveTeamAction, removeMemberAction, revokeInvitationAction, revokeKeyAction } from "./actions";
import { WebhookDesk } from "./webhook-desk";

export const metadata: Metadata = { title: "Team" };

export default async function TeamPage() {
  const actor = await requireActor();
  const team = await readTeam(actor, {});
  return (
    <Sheet margin={<TeamMargin />}>
      <PageTitle title={actor.teamName} below={team.mayManage ? "Members, invitations and keys of the team." : "Members, invitations and keys of the team. Owners can change them."} />
      <section className="grid gap-3">
        <h2 className="text-xl font-semibold">Members</h2>
        <MemberTable members={team.members} ownId={actor.userId} mayManage={team.mayManage} changeRole={changeRoleAction} remove={removeMemberAction} />
        <LeaveTeam teamName={actor.teamName} leave={leaveTeamAction} />
      </section>
      <section className="grid gap-3">
        <h2 className="text-xl font-semibold">Invitations</h2>
        <InvitationTable invitations={team.invitations} revoke={revokeInvitationAction} />
        {team.mayManage && <InviteForm action={inviteAction} />}
      </section>
      <section className="grid gap-3">
        <h2 className="text-xl font-semibold">API keys</h2>
        <KeyTable keys={team.keys} mayManage={team.mayManage} revoke={revokeKeyAction} />
        {team.mayManage && <KeyForm action={createKeyAction} />}
      </section>
      {team.mayManage && <WebhookDesk />}
    </Sheet>
  );
}

function TeamMargin() {
  return (
    <Margin>
      <MarginSection title="Roles">
        <RoleTable />
      </MarginSection>
      <MarginSection title="Keys">
        <p>
          A script sends its key as <code className="font-mono text-xs">Authorization: Bearer</code>. A key belongs to this team, can do at most what its maker may do now, and ends when its maker leaves.
        </p>
      </MarginSection>
    </Margin>
  );
}
