import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { actorFromHeaders, personFromHeaders } from "@/lib/auth/actor";
import type { Actor } from "@/lib/auth/guard";
import { switchTeam } from "@/lib/use-cases/account/switch-team";
import { acceptInvitation } from "@/lib/use-cases/team/accept-invitation";
import { changeMemberRole } from "@/lib/use-cases/team/change-member-role";
import { createTeam } from "@/lib/use-cases/team/create-team";
import { inviteMember } from "@/lib/use-cases/team/invite-member";
import { leaveTeam } from "@/lib/use-cases/team/leave-team";
import { prepareTeam } from "@/lib/use-cases/team/prepare-team";
import { readInvitation } from "@/lib/use-cases/team/read-invitation";
import { readTeam } from "@/lib/use-cases/team/read-team";
import { registerPerson } from "@/lib/use-cases/team/register-person";
import { removeMember } from "@/lib/use-cases/team/remove-member";
import { revokeInvitation } from "@/lib/use-cases/team/revoke-invitation";
import { actorOfAccount, headersWith, signInAs, startInstallation, testBaseUrl, testPassword, type Installation } from "../support/accounts";

let installation: Installation;
let ada: Actor;
const request = { headers: headersWith() };

beforeAll(async () => {
  installation = await startInstallation();
  await registerPerson(request, { name: "Ada", email: "ada@example.org", password: testPassword, teamName: "Brook works" });
  await registerPerson(request, { name: "Zoe", email: "zoe@example.org", password: testPassword, teamName: "Other works" });
  ada = await actorOfAccount("ada@example.org");
});
afterAll(() => installation.close());
beforeEach(() => installation.owner.query("delete from throttle"));

async function invite(email: string, role = "analyst"): Promise<string> {
  return (await inviteMember(ada, { email, role })).invitationId;
}

async function joined(name: string, role = "analyst"): Promise<Actor> {
  const email = `${name}@example.org`;
  const invitationId = await invite(email, role);
  await registerPerson(request, { name, email, password: testPassword, invitationId });
  return actorOfAccount(email);
}

async function auditOf(action: string): Promise<unknown[]> {
  const { rows } = await installation.owner.query("select subject_id from audit where team_id = $1 and action = $2 order by at", [ada.teamId, action]);
  return rows.map((row: { subject_id: unknown }) => row.subject_id);
}

describe("an invitation", () => {
  it("is a letter with a link, and an audit row, or nothing at all", async () => {
    const id = await invite("guest@example.org", "observer");
    const { rows } = await installation.owner.query<{ text: string }>("select data ->> 'text' as text from jobs.job where data ->> 'to' = 'guest@example.org'");
    expect(rows.map(({ text }) => text.includes(`${testBaseUrl}/invitation/${id}`))).toEqual([true]);
    expect(await auditOf("invitation.sent")).toContain("guest@example.org");
    await expect(invite("ada@example.org")).rejects.toMatchObject({ code: "invalid", fields: [{ path: "email", message: "ada@example.org is in the team already." }] });
    expect((await auditOf("invitation.sent")).filter((address) => address === "ada@example.org")).toEqual([]);
  });

  it("leads a new person into the team with the role, and works once", async () => {
    const invitationId = await invite("ben@example.org", "curator");
    expect(await readInvitation(request, { invitationId })).toMatchObject({ teamName: "Brook works", email: "ben@example.org", role: "curator", inviterName: "Ada", accountExists: false });
    await registerPerson(request, { name: "Ben", email: "ben@example.org", password: testPassword, invitationId });
    const ben = await actorOfAccount("ben@example.org");
    expect(ben).toMatchObject({ teamId: ada.teamId, role: "curator" });
    expect(await auditOf("member.joined")).toContain(ben.userId);
    await expect(readInvitation(request, { invitationId })).rejects.toMatchObject({ code: "not-found" });
  });

  it("leads somebody of another team into this one beside it, and the session can act for either", async () => {
    const invitationId = await invite("zoe@example.org", "observer");
    const headers = await signInAs("zoe@example.org");
    const before = await personFromHeaders(headers);
    await acceptInvitation(before, { invitationId });
    expect(await actorFromHeaders(headers)).toMatchObject({ teamName: "Other works", role: "owner" });
    await switchTeam(before, { teamId: ada.teamId });
    expect(await actorFromHeaders(headers)).toMatchObject({ teamName: "Brook works", role: "observer" });
  });

  it("is refused to another address than the invited one", async () => {
    const invitationId = await invite("carl@example.org");
    const zoe = await personFromHeaders(await signInAs("zoe@example.org"));
    await expect(acceptInvitation(zoe, { invitationId })).rejects.toMatchObject({ code: "forbidden" });
    await expect(registerPerson(request, { name: "M", email: "mallory@example.org", password: testPassword, invitationId })).rejects.toMatchObject({ code: "invalid", fields: [{ path: "email" }] });
  });

  it("is accepted once by two tabs at once", async () => {
    await registerPerson(request, { name: "Dora", email: "dora@example.org", password: testPassword, teamName: "D" });
    const invitationId = await invite("dora@example.org");
    const dora = await personFromHeaders(await signInAs("dora@example.org"));
    const answers = await Promise.allSettled([acceptInvitation(dora, { invitationId }), acceptInvitation(dora, { invitationId })]);
    expect(answers.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
  });

  it.each([
    ["revoked", async (id: string) => revokeInvitation(ada, { invitationId: id })],
    ["replaced by a newer one", async () => invite("eve@example.org", "observer")],
    ["too old", async (id: string) => installation.owner.query("update invitation set expires_at = now() - interval '1 second' where id = $1", [id])],
  ])("does not work when %s", async (_, end) => {
    const invitationId = await invite("eve@example.org");
    await end(invitationId);
    await expect(readInvitation(request, { invitationId })).rejects.toMatchObject({ code: "not-found" });
    await expect(registerPerson(request, { name: "Eve", email: "eve@example.org", password: testPassword, invitationId })).rejects.toMatchObject({ code: "not-found" });
    const { rowCount } = await installation.owner.query(`select 1 from "user" where email = 'eve@example.org'`);
    expect(rowCount).toBe(0);
  });

  it("of another team can't be revoked", async () => {
    const zoeHeaders = await signInAs("zoe@example.org");
    const zoe = await actorFromHeaders(zoeHeaders);
    expect(zoe?.teamName).toBe("Other works");
    const invitationId = await invite("fay@example.org");
    await expect(revokeInvitation(zoe, { invitationId })).rejects.toMatchObject({ code: "not-found" });
    expect(await readInvitation(request, { invitationId })).toMatchObject({ email: "fay@example.org" });
  });
});

describe("members", () => {
  it("get other roles at once, with an audit row", async () => {
    const gil = await joined("gil", "analyst");
    await changeMemberRole(ada, { userId: gil.userId, role: "curator" });
    expect(await actorOfAccount("gil@example.org")).toMatchObject({ role: "curator" });
    expect(await auditOf("member.role-changed")).toContain(gil.userId);
  });

  it("that are removed lose their access at once, in an open session too", async () => {
    await joined("hal");
    const session = await signInAs("hal@example.org");
    const hal = await actorFromHeaders(session);
    await removeMember(ada, { userId: hal?.userId });
    expect(await actorFromHeaders(session)).toBeNull();
    expect(await personFromHeaders(session)).toMatchObject({ teams: [] });
  });

  it.each([
    ["step down", () => changeMemberRole(ada, { userId: ada.userId, role: "analyst" })],
    ["be removed", () => removeMember(ada, { userId: ada.userId })],
    ["leave", () => leaveTeam(ada, {})],
  ])("that own the team alone can't %s", async (_, act) => {
    await expect(act()).rejects.toMatchObject({ code: "conflict", message: "A team needs an owner. Make somebody else owner first." });
    expect((await readTeam(ada, {})).members.filter(({ role }) => role === "owner").map(({ email }) => email)).toEqual(["ada@example.org"]);
  });

  it("that own it both can't step down past each other", async () => {
    const ivo = await joined("ivo", "owner");
    const stepDown = (userId: string, actor: Actor) => changeMemberRole(actor, { userId, role: "analyst" });
    const answers = await Promise.allSettled([stepDown(ada.userId, ivo), stepDown(ivo.userId, ada)]);
    expect(answers.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    await installation.owner.query("update member set role = 'owner' where organization_id = $1 and user_id = $2", [ada.teamId, ada.userId]);
    await installation.owner.query("update member set role = 'analyst' where organization_id = $1 and user_id = $2", [ada.teamId, ivo.userId]);
  });

  it("of another team can't be touched", async () => {
    const zoe = await actorOfAccount("zoe@example.org");
    expect(zoe.teamName).toBe("Other works");
    await expect(removeMember(zoe, { userId: ada.userId })).rejects.toMatchObject({ code: "not-found" });
    await expect(changeMemberRole(zoe, { userId: ada.userId, role: "observer" })).rejects.toMatchObject({ code: "not-found" });
    expect((await readTeam(zoe, {})).members.map(({ email }) => email)).toEqual(["zoe@example.org"]);
  });
});

describe("the team page", () => {
  it.each(["curator", "analyst", "observer"])("shows a %s everything but the secrets in invitation links", async (role) => {
    await invite("open@example.org");
    const reader = await joined(`reader-${role}`, role);
    const team = await readTeam(reader, {});
    expect(team.mayManage).toBe(false);
    expect(team.invitations.map(({ email, id }) => ({ email, id }))).toContainEqual({ email: "open@example.org", id: null });
  });
});

describe("a team", () => {
  it("can't be acted for by somebody who is not in it", async () => {
    const person = await personFromHeaders(await signInAs("ben@example.org"));
    const { rows } = await installation.owner.query<{ id: string }>("select id from organization where name = 'Other works'");
    await expect(switchTeam(person, { teamId: rows[0]?.id })).rejects.toMatchObject({ code: "not-found" });
  });

  it("is made by anybody who is signed in, who then owns it", async () => {
    const person = await personFromHeaders(await signInAs("ben@example.org"));
    const { teamId } = await createTeam(person, { teamName: "Ben's own" });
    await switchTeam(person, { teamId });
    const again = await personFromHeaders(new Headers(await signInAs("ben@example.org")));
    expect(again?.teams.map(({ teamName, role }) => [teamName, role])).toEqual([["Brook works", "curator"], ["Ben's own", "owner"]]);
  });

  it("is prepared once, however often and however much at once it is asked for", async () => {
    const { rows } = await installation.owner.query<{ id: string; user_id: string }>("select id, user_id from member where organization_id = $1 and role = 'owner'", [ada.teamId]);
    const team = { teamId: ada.teamId, ownerId: rows[0]?.user_id ?? "" };
    await installation.owner.query("delete from edition where team_id = $1", [ada.teamId]);
    await installation.owner.query("delete from machine where team_id = $1", [ada.teamId]);
    await installation.owner.query("delete from team_counter where team_id = $1", [ada.teamId]);
    const answers = await Promise.all([prepareTeam(team), prepareTeam(team), prepareTeam(team)]);
    expect(answers.filter(Boolean)).toHaveLength(1);
    const { rowCount } = await installation.owner.query("select 1 from edition where team_id = $1", [ada.teamId]);
    expect(rowCount).toBe(1);
  });
});
