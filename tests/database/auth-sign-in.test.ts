import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { actorFromHeaders, personFromHeaders } from "@/lib/auth/actor";
import { getAuth } from "@/lib/auth/auth";
import { changePassword, endOtherSessions } from "@/lib/use-cases/account/change-account";
import { askForReset, resetPassword } from "@/lib/use-cases/account/reset-password";
import { signIn } from "@/lib/use-cases/account/sign-in";
import { signOut } from "@/lib/use-cases/account/sign-out";
import { isFirstRegistration, registerPerson } from "@/lib/use-cases/team/register-person";
import { headersWith, signInAs, startInstallation, testBaseUrl, testPassword, type Installation } from "../support/accounts";

let installation: Installation;
const request = (address?: string) => ({ headers: headersWith(address === undefined ? {} : { address }) });
const register = (email: string, extra: Record<string, unknown> = {}) =>
  registerPerson(request(), { name: "Ada Brook", email, password: testPassword, teamName: "Brook works", ...extra });

beforeAll(async () => {
  installation = await startInstallation();
});
afterAll(() => installation.close());
beforeEach(() => installation.owner.query("delete from throttle"));

describe("registering", () => {
  it("makes the first person owner of the first team, with edition 1, a machine sheet and audit rows", async () => {
    expect(await isFirstRegistration()).toBe(true);
    const { teamId } = await register("ada@example.org");
    expect(await isFirstRegistration()).toBe(false);
    const { owner } = installation;
    const rows = async (sql: string) => (await owner.query(sql, [teamId])).rows;
    expect(await rows("select u.email, m.role from member m join \"user\" u on u.id = m.user_id where organization_id = $1")).toEqual([{ email: "ada@example.org", role: "owner" }]);
    expect(await rows("select number, origin, jsonb_array_length(rules) >= 24 as enough from edition where team_id = $1")).toEqual([{ number: 1, origin: "first", enough: true }]);
    expect(await rows("select name, cores_per_node, nodes from machine where team_id = $1")).toEqual([{ name: "32-core server", cores_per_node: 32, nodes: 1 }]);
    expect(await rows("select next_case, next_edition from team_counter where team_id = $1")).toEqual([{ next_case: 1, next_edition: 2 }]);
    expect(await rows("select action from audit where team_id = $1 order by action")).toEqual([{ action: "edition.published" }, { action: "machine.added" }, { action: "team.made" }]);
  });

  it.each([
    ["a taken address", { email: "ada@example.org" }, "email", "This address has an account. Sign in instead."],
    ["a taken address in capitals", { email: "ADA@Example.org" }, "email", "This address has an account. Sign in instead."],
    ["no address", { email: "ada" }, "email", "Enter an e-mail address such as name@example.org."],
    ["a short password", { password: "123456789" }, "password", "A password has at least 10 characters."],
    ["no team and no invitation", { teamName: undefined }, "teamName", "Name the team."],
    ["a blank team", { teamName: "  " }, "teamName", "Name the team."],
    ["an unknown field", { role: "owner" }, "role", "This field is not known."],
  ])("refuses %s at its field and keeps nothing", async (_, change, path, message) => {
    const countPeople = async () => (await installation.owner.query('select count(*)::int as n from "user"')).rows[0];
    const before = await countPeople();
    await expect(register("bea@example.org", change)).rejects.toMatchObject({ code: "invalid", fields: expect.arrayContaining([{ path, message }]) });
    expect(await countPeople()).toEqual(before);
  });
});

describe("signing in", () => {
  it("answers a wrong password and an unknown address with the same sentence", async () => {
    const attempt = (email: string) => signIn(request(), { email, password: "not the password" }).catch((error: Error) => error.message);
    expect(await attempt("ada@example.org")).toBe(await attempt("nobody@example.org"));
  });

  it("gives a cookie that scripts of a page can't read and other sites don't send", async () => {
    const { headers } = await getAuth().api.signInEmail({ body: { email: "ada@example.org", password: testPassword }, headers: headersWith(), returnHeaders: true });
    expect(headers.getSetCookie().join()).toMatch(/^saddlemark\.session_token=.*HttpOnly; SameSite=Lax/);
    // Over plain http a secure cookie would never come back.
    expect(headers.getSetCookie().join()).not.toMatch(/Secure/);
  });

  it("ends with signing out", async () => {
    const headers = await signInAs("ada@example.org");
    expect(await actorFromHeaders(headers)).toMatchObject({ userEmail: "ada@example.org", role: "owner", teamName: "Brook works" });
    await signOut({ headers }, {});
    expect(await personFromHeaders(headers)).toBeNull();
  });

  it.each([["no cookie", ""], ["a made-up cookie", "saddlemark.session_token=abc.def"]])("gives nobody for %s", async (_, cookie) => {
    expect(await actorFromHeaders(new Headers({ cookie }))).toBeNull();
  });
});

describe("guessing passwords", () => {
  const guess = (address: string, email = "ada@example.org") =>
    signIn(request(address), { email, password: "not the password" }).then(() => "in", (error: { code: string; message: string }) => error);

  it("is stopped after five tries a minute from one address, in words that say how long to wait", async () => {
    for (let count = 0; count < 5; count += 1) expect(await guess("192.0.2.7")).toMatchObject({ code: "invalid" });
    const refused = await guess("192.0.2.7");
    expect(refused).toMatchObject({ code: "too-many-requests", message: expect.stringMatching(/^Too many attempts for this account from here\. Wait \d+ s, then try again\.$/) });
  });

  it("refuses the right password too while it is stopped, so that a guess can't be told", async () => {
    for (let count = 0; count < 5; count += 1) await guess("192.0.2.7");
    await expect(signIn(request("192.0.2.7"), { email: "ada@example.org", password: testPassword })).rejects.toMatchObject({ code: "too-many-requests" });
  });

  it("is stopped for the account after ten tries from ten addresses", async () => {
    for (let count = 0; count < 10; count += 1) expect(await guess(`192.0.2.${count + 10}`)).toMatchObject({ code: "invalid" });
    expect(await guess("192.0.2.99")).toMatchObject({ code: "too-many-requests", message: expect.stringContaining("for this account.") });
  });

  it("is stopped when all tries come at once", async () => {
    const answers = await Promise.all(Array.from({ length: 12 }, () => guess("192.0.2.7")));
    const codes = answers.map((answer) => (typeof answer === "string" ? answer : answer.code));
    expect(codes.filter((code) => code === "invalid").length).toBeLessThanOrEqual(5);
    expect(codes).toContain("too-many-requests");
  });

  it("does not stop other accounts, nor people who know their password", async () => {
    for (let count = 0; count < 6; count += 1) await guess("192.0.2.7", "nobody@example.org");
    for (let count = 0; count < 12; count += 1) {
      expect(await signIn(request("192.0.2.7"), { email: "ada@example.org", password: testPassword })).toBeUndefined();
    }
  });

  it("is answered with 429 over HTTP as well", async () => {
    const post = () =>
      getAuth().handler(
        new Request(`${testBaseUrl}/api/auth/sign-in/email`, {
          method: "POST",
          headers: { "content-type": "application/json", origin: testBaseUrl, "x-forwarded-for": "192.0.2.8" },
          body: JSON.stringify({ email: "ada@example.org", password: "not the password" }),
        }),
      );
    for (let count = 0; count < 5; count += 1) expect((await post()).status).toBe(401);
    const refused = await post();
    expect(refused.status).toBe(429);
    expect(refused.headers.get("retry-after")).toMatch(/^\d+$/);
    expect(await refused.json()).toMatchObject({ message: expect.stringContaining("Too many attempts") });
  });
});

describe("choosing a new password", () => {
  /** The letters waiting in the queue for one address. */
  async function lettersTo(address: string): Promise<string[]> {
    const { rows } = await installation.owner.query<{ text: string }>("select data ->> 'text' as text from jobs.job where name = 'send-email' and data ->> 'to' = $1 order by created_on", [address]);
    return rows.map(({ text }) => text);
  }
  const tokenIn = (letter: string | undefined) => /reset-password\?token=(\S+)/.exec(letter ?? "")?.[1] ?? "";

  it("goes by a link that works once, and ends every session", async () => {
    await register("reset@example.org");
    const session = await signInAs("reset@example.org");
    await askForReset(request(), { email: "reset@example.org" });
    const token = tokenIn((await lettersTo("reset@example.org")).at(-1));
    expect(token).not.toBe("");
    await resetPassword(request(), { token, password: "another password" });
    expect(await personFromHeaders(session)).toBeNull();
    await expect(signInAs("reset@example.org")).rejects.toThrow();
    expect(await personFromHeaders(await signInAs("reset@example.org", "another password"))).not.toBeNull();
    await expect(resetPassword(request(), { token, password: "a third password" })).rejects.toMatchObject({ code: "invalid", message: "This link is used or too old. Ask for a new one." });
  });

  it("answers an unknown address as a known one, and writes no letter", async () => {
    expect(await askForReset(request(), { email: "nobody@example.org" })).toBeUndefined();
    expect(await lettersTo("nobody@example.org")).toEqual([]);
  });

  it("does not flood anybody with letters", async () => {
    for (let count = 0; count < 3; count += 1) await askForReset(request(), { email: "ada@example.org" });
    await expect(askForReset(request(), { email: "ada@example.org" })).rejects.toMatchObject({ code: "too-many-requests" });
    expect(await lettersTo("ada@example.org")).toHaveLength(3);
  });

  it("needs the present one when signed in, and ends the other sessions", async () => {
    await register("change@example.org");
    const [here, there] = [await signInAs("change@example.org"), await signInAs("change@example.org")];
    const change = (currentPassword: string) => changePassword({ headers: here }, { currentPassword, newPassword: "quite another one" });
    await expect(change("wrong password")).rejects.toMatchObject({ code: "invalid", fields: [{ path: "currentPassword", message: "This is not your present password." }] });
    expect(await personFromHeaders(there)).not.toBeNull();
    await change(testPassword);
    expect(await personFromHeaders(there)).toBeNull();
  });

  it("is refused to nobody in particular", async () => {
    await expect(endOtherSessions(request(), {})).rejects.toMatchObject({ code: "unauthenticated" });
  });
});
