import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { actorFromHeaders } from "@/lib/auth/actor";
import { authorise, type Actor } from "@/lib/auth/guard";
import { changeMemberRole } from "@/lib/use-cases/team/change-member-role";
import { createKey } from "@/lib/use-cases/team/create-key";
import { inviteMember } from "@/lib/use-cases/team/invite-member";
import { readTeam } from "@/lib/use-cases/team/read-team";
import { registerPerson } from "@/lib/use-cases/team/register-person";
import { removeMember } from "@/lib/use-cases/team/remove-member";
import { revokeKey } from "@/lib/use-cases/team/revoke-key";
import { actorOfAccount, headersWith, signInAs, startInstallation, testPassword, type Installation } from "../support/accounts";

let installation: Installation;
let ada: Actor;
let zoe: Actor;
const request = { headers: headersWith() };

beforeAll(async () => {
  installation = await startInstallation();
  await registerPerson(request, { name: "Ada", email: "ada@example.org", password: testPassword, teamName: "Brook works" });
  await registerPerson(request, { name: "Zoe", email: "zoe@example.org", password: testPassword, teamName: "Other works" });
  ada = await actorOfAccount("ada@example.org");
  zoe = await actorOfAccount("zoe@example.org");
});
afterAll(() => installation.close());
beforeEach(() => installation.owner.query("delete from throttle"));

const asKey = (bearer: string) => actorFromHeaders(headersWith({ bearer }));

describe("a key", () => {
  it.each([
    ["read", "cases:read", true],
    ["read", "cases:write", false],
    ["read", "runs:write", false],
    ["read", "team:manage", false],
    ["write", "cases:read", true],
    ["write", "cases:write", true],
    ["write", "runs:write", true],
  ] as const)("with scope %s and permission %s: allowed %s", async (scope, permission, allowed) => {
    const { key } = await createKey(ada, { name: "batch", scope });
    const actor = await asKey(key);
    expect(actor).toMatchObject({ teamId: ada.teamId, userId: ada.userId, role: "owner", via: { kind: "key", scope } });
    if (allowed) expect(authorise(actor, permission)).toMatchObject({ teamId: ada.teamId });
    else expect(() => authorise(actor, permission)).toThrow("This key may only read.");
  });

  it("is stored as a hash, beginning excepted, and shown to nobody afterwards", async () => {
    const { id, key } = await createKey(ada, { name: "secret", scope: "read" });
    expect(key).toMatch(/^sdm_[A-Za-z]{64}$/);
    const { rows } = await installation.owner.query("select row_to_json(apikey)::text as row from apikey where id = $1", [id]);
    expect(rows[0].row).not.toContain(key.slice(12));
    expect(JSON.stringify(await readTeam(ada, {}))).not.toContain(key.slice(12));
  });

  it("is listed with its last use and who made it, and its making and end are in the audit", async () => {
    const { id, key } = await createKey(ada, { name: "watched", scope: "write" });
    const listed = async () => (await readTeam(ada, {})).keys.find((entry) => entry.id === id);
    expect(await listed()).toMatchObject({ name: "watched", scope: "write", makerName: "Ada", lastUsedAt: null, start: key.slice(0, 10) });
    await asKey(key);
    expect((await listed())?.lastUsedAt).toBeInstanceOf(Date);
    await revokeKey(ada, { keyId: id });
    const { rows } = await installation.owner.query("select action from audit where subject_id = $1 order by at", [id]);
    expect(rows).toEqual([{ action: "key.made" }, { action: "key.revoked" }]);
  });

  it("ends at once when it is revoked", async () => {
    const { id, key } = await createKey(ada, { name: "short", scope: "read" });
    expect(await asKey(key)).not.toBeNull();
    await revokeKey(ada, { keyId: id });
    expect(await asKey(key)).toBeNull();
  });

  it("of another team is neither seen nor revoked", async () => {
    const { id, key } = await createKey(ada, { name: "ours", scope: "read" });
    expect((await readTeam(zoe, {})).keys).toEqual([]);
    await expect(revokeKey(zoe, { keyId: id })).rejects.toMatchObject({ code: "not-found" });
    expect(await asKey(key)).toMatchObject({ teamId: ada.teamId });
  });

  it("can do what its maker may do now, and nothing once they have left, also after they come back", async () => {
    const { invitationId } = await inviteMember(ada, { email: "ben@example.org", role: "owner" });
    await registerPerson(request, { name: "Ben", email: "ben@example.org", password: testPassword, invitationId });
    const ben = await actorOfAccount("ben@example.org");
    const { key } = await createKey(ben, { name: "ben's", scope: "write" });
    await changeMemberRole(ada, { userId: ben.userId, role: "observer" });
    expect(() => authorise({ ...ben, role: "observer" }, "cases:write")).toThrow();
    expect(await asKey(key)).toMatchObject({ role: "observer" });
    await removeMember(ada, { userId: ben.userId });
    expect(await asKey(key)).toBeNull();
    await installation.owner.query("insert into member (id, organization_id, user_id, role) values ('again', $1, $2, 'owner')", [ada.teamId, ben.userId]);
    expect(await asKey(key)).toBeNull();
  });

  it.each(["curator", "analyst", "observer"] as const)("is made by owners, not by a %s", async (role) => {
    await expect(createKey({ ...ada, role }, { name: "k", scope: "read" })).rejects.toMatchObject({ code: "forbidden" });
  });
});

describe("a bad key", () => {
  it.each([
    ["made up", "Bearer sdm_abcdefghijklmnopqrstuvwxyz"],
    ["of another kind", "Bearer ghp_abcdefghijklmnopqrstuvwxyz"],
    ["empty", "Bearer "],
    ["of another scheme", "Basic YWRhOnBhc3N3b3Jk"],
    ["endless", `Bearer sdm_${"a".repeat(5000)}`],
  ])("that is %s is nobody's, whatever cookie comes along, and leaves no line in the log", async (_, authorization) => {
    const lines = vi.spyOn(console, "error").mockImplementation(() => undefined);
    const headers = await signInAs("ada@example.org");
    expect(await actorFromHeaders(headers)).not.toBeNull();
    headers.set("authorization", authorization);
    expect(await actorFromHeaders(headers)).toBeNull();
    expect(lines).not.toHaveBeenCalled();
    lines.mockRestore();
  });
});
