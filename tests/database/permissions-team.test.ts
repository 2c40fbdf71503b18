import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import type { Actor } from "@/lib/auth/guard";
import { roles, type Role } from "@/lib/auth/permissions";
import { changeMemberRole } from "@/lib/use-cases/team/change-member-role";
import { createKey } from "@/lib/use-cases/team/create-key";
import { inviteMember } from "@/lib/use-cases/team/invite-member";
import { leaveTeam } from "@/lib/use-cases/team/leave-team";
import { readTeam } from "@/lib/use-cases/team/read-team";
import { registerPerson } from "@/lib/use-cases/team/register-person";
import { removeMember } from "@/lib/use-cases/team/remove-member";
import { revokeInvitation } from "@/lib/use-cases/team/revoke-invitation";
import { revokeKey } from "@/lib/use-cases/team/revoke-key";
import { actorOfAccount, headersWith, startInstallation, testPassword, type Installation } from "../support/accounts";

let installation: Installation;
let owner: Actor;
const request = { headers: headersWith() };

beforeAll(async () => {
  installation = await startInstallation();
  await registerPerson(request, { name: "Ada", email: "ada@example.org", password: testPassword, teamName: "Brook works" });
  owner = await actorOfAccount("ada@example.org");
});
afterAll(() => installation.close());
beforeEach(() => installation.owner.query("delete from throttle"));

type Call = { call: (actor: Actor | null) => Promise<unknown>; allowed: readonly Role[] };

// Expected by product.md's roles: owners manage members and keys, everybody reads. Ids that don't exist answer "not-found" to
// whoever may ask, so that "forbidden" shows the guard and nothing else.
const calls: Record<string, Call> = {
  readTeam: { call: (actor) => readTeam(actor, {}), allowed: roles },
  inviteMember: { call: (actor) => inviteMember(actor, { email: `guest-${actor?.role}@example.org`, role: "observer" }), allowed: ["owner"] },
  revokeInvitation: { call: (actor) => revokeInvitation(actor, { invitationId: "none" }), allowed: ["owner"] },
  changeMemberRole: { call: (actor) => changeMemberRole(actor, { userId: "none", role: "observer" }), allowed: ["owner"] },
  removeMember: { call: (actor) => removeMember(actor, { userId: "none" }), allowed: ["owner"] },
  createKey: { call: (actor) => createKey(actor, { name: "k", scope: "read" }), allowed: ["owner"] },
  revokeKey: { call: (actor) => revokeKey(actor, { keyId: "none" }), allowed: ["owner"] },
  leaveTeam: { call: (actor) => leaveTeam(actor, {}), allowed: roles },
};

it("has a line for every use-case of the team", () => {
  const folder = join(process.cwd(), "lib/use-cases/team");
  const sources = readdirSync(folder).map((name) => readFileSync(join(folder, name), "utf8"));
  const names = sources.flatMap((source) => [...source.matchAll(/export const (\w+) = defineUseCase/g)].map((match) => match[1]));
  expect(names.sort()).toEqual(Object.keys(calls).sort());
});

const codeOf = (work: Promise<unknown>) => work.then(() => "done", (error: { code?: string }) => error.code ?? "fault");

describe.each(Object.entries(calls))("%s", (_, { call, allowed }) => {
  it.each(roles)("as %s is answered or forbidden as the table says", async (role) => {
    const code = await codeOf(call({ ...owner, role }));
    if (allowed.includes(role)) expect(["done", "not-found", "conflict"]).toContain(code);
    else expect(code).toBe("forbidden");
  });

  it("as nobody asks to sign in", async () => {
    expect(await codeOf(call(null))).toBe("unauthenticated");
  });
});
