import { describe, expect, it } from "vitest";
import { authorise, defineUseCase, type Actor } from "@/lib/auth/guard";
import { isReadPermission, mayRole, permissionTable, roles, type Permission, type Role } from "@/lib/auth/permissions";
import { teamRoles } from "@/lib/auth/team-access";
import { z } from "zod";

// Written down a second time, from the roles' definitions in words: owner "members, machines, deletion, keys", curator "edits,
// replays and publishes the rulebook", analyst "cases, run reports, pilot trials", observer "reads everything, changes nothing".
const expected: Record<Permission, string> = {
  "team:read": "owner curator analyst observer",
  "team:manage": "owner",
  "keys:manage": "owner",
  "machines:read": "owner curator analyst observer",
  "machines:manage": "owner",
  "machines:add": "owner curator analyst",
  "cases:read": "owner curator analyst observer",
  "cases:write": "owner curator analyst",
  "cases:delete": "owner",
  "runs:read": "owner curator analyst observer",
  "runs:write": "owner curator analyst",
  "hit-rates:read": "owner curator analyst observer",
  "rulebook:read": "owner curator analyst observer",
  "rulebook:edit": "owner curator",
  "audit:read": "owner curator analyst observer",
  "export:read": "owner curator analyst observer",
};

const isPermission = (name: string): name is Permission => name in expected;
const permissions = Object.keys(permissionTable).filter(isPermission);
const actorAs = (role: Role, via: Actor["via"] = { kind: "session" }): Actor => ({ userId: "u", userName: "U", userEmail: "u@example.org", teamId: "t", teamName: "T", role, via });

describe("the permission table", () => {
  it("names every permission that is expected and no other", () => {
    expect(Object.keys(permissionTable).sort()).toEqual(Object.keys(expected).sort());
  });

  it.each(permissions.flatMap((permission) => roles.map((role) => [permission, role] as const)))("%s for %s", (permission, role) => {
    expect(mayRole(role, permission)).toBe(expected[permission].split(" ").includes(role));
  });

  it("gives an observer reading and nothing else", () => {
    expect(permissions.filter((permission) => mayRole("observer", permission))).toEqual(permissions.filter(isReadPermission));
  });

  it.each(["", "admin", "Owner", "member", "owner,observer", "__proto__"])("gives the unknown role %j no right", (role) => {
    expect(permissions.filter((permission) => mayRole(role, permission))).toEqual([]);
  });

  it.each(roles)("decides what better-auth lets a %s do with a team", (role) => {
    const { success } = teamRoles[role].authorize({ invitation: ["create"], member: ["delete"] });
    expect(success).toBe(mayRole(role, "team:manage"));
  });
});

describe("a key", () => {
  it.each(permissions)("with scope read has %s only if it reads", (permission) => {
    const ask = () => authorise(actorAs("owner", { kind: "key", keyId: "k", scope: "read" }), permission);
    if (permission.endsWith(":read")) expect(ask()).toMatchObject({ teamId: "t" });
    else expect(ask).toThrow("This key may only read.");
  });

  it("with scope write can do no more than its maker's role", () => {
    expect(() => authorise(actorAs("observer", { kind: "key", keyId: "k", scope: "write" }), "cases:write")).toThrow("does not allow this");
  });
});

describe("a use-case", () => {
  const seen: string[] = [];
  const useCase = defineUseCase({
    permission: "cases:write",
    input: z.strictObject({ title: z.string().min(1, "Give it a title.") }),
    run: async ({ scope }, { title }) => {
      seen.push(title);
      return scope.teamId;
    },
  });

  it("runs for who may, with the parsed input", async () => {
    await expect(useCase(actorAs("analyst"), { title: "a" })).resolves.toBe("t");
  });

  it.each([
    ["nobody", null, { title: "b" }, "unauthenticated"],
    ["an observer", actorAs("observer"), { title: "b" }, "forbidden"],
    // Who may not ask learns nothing about what the question should look like.
    ["an observer with bad input", actorAs("observer"), {}, "forbidden"],
    ["bad input", actorAs("analyst"), { title: "" }, "invalid"],
    ["an unknown field", actorAs("analyst"), { title: "b", teamId: "other" }, "invalid"],
  ] as const)("does not run for %s", async (_, actor, input, code) => {
    await expect(useCase(actor, input)).rejects.toMatchObject({ code });
    expect(seen).not.toContain("b");
  });
});
