import { APIError } from "better-auth/api";
import { describe, expect, it, vi } from "vitest";
import { clientAddress } from "@/lib/auth/client-address";
import { fieldsOf, formResult } from "@/lib/auth/form-result";
import { isOpenAuthPath } from "@/lib/auth/http-paths";
import { safeNext } from "@/lib/auth/safe-next";
import { readAuthSettings, readMode } from "@/lib/auth/settings";
import { AppError } from "@/lib/shared/app-error";

describe("after signing in", () => {
  it.each([
    ["/cases/7?sort=unknowns#runs", "/cases/7?sort=unknowns#runs"],
    ["/", "/"],
    [undefined, "/cases"],
    ["", "/cases"],
    ["cases", "/cases"],
    ["https://elsewhere.example", "/cases"],
    ["//elsewhere.example/x", "/cases"],
    ["/\\elsewhere.example", "/cases"],
    ["/\t/elsewhere.example", "/cases"],
    ["javascript:alert(1)", "/cases"],
  ])("%j leads to %s, never to another site", (next, expected) => {
    expect(safeNext(next)).toBe(expected);
  });
});

describe("a form's answer", () => {
  it("is the value of what was done", async () => {
    expect(await formResult(async () => 3)).toEqual({ ok: true, value: 3 });
  });

  it("names the field of an expected refusal", async () => {
    const fields = [{ path: "email", message: "Taken." }];
    expect(await formResult(() => Promise.reject(new AppError("invalid", "No.", { fields })))).toEqual({ ok: false, message: "No.", fields });
  });

  it("translates better-auth's refusals", async () => {
    const refusal = new APIError("UNAUTHORIZED", { code: "INVALID_EMAIL_OR_PASSWORD", message: "x" });
    expect(await formResult(() => Promise.reject(refusal))).toMatchObject({ ok: false, message: expect.stringContaining("No account has this e-mail address and password") });
  });

  it("does not show the message of a fault", async () => {
    const log = vi.spyOn(console, "error").mockImplementation(() => undefined);
    const answer = await formResult(() => Promise.reject(new Error("connect ECONNREFUSED 10.0.0.1")));
    expect(JSON.stringify(answer)).not.toContain("10.0.0.1");
    expect(log).toHaveBeenCalledOnce();
    log.mockRestore();
  });

  it("reads real form data, without Next's own fields and without files", () => {
    const data = new FormData();
    data.set("email", "a@example.org");
    data.set("$ACTION_ID_1", "x");
    data.set("file", new File(["x"], "x.txt"));
    expect(fieldsOf(data)).toEqual({ email: "a@example.org" });
  });
});

describe("better-auth over HTTP", () => {
  it.each(["/api/auth/sign-in/email", "/api/auth/get-session", "/api/auth/sign-out"])("answers %s", (path) => {
    expect(isOpenAuthPath(path)).toBe(true);
  });

  it.each([
    "/api/auth/organization/update-member-role",
    "/api/auth/organization/invite-member",
    "/api/auth/organization/remove-member",
    "/api/auth/organization/create",
    "/api/auth/api-key/create",
    "/api/auth/api-key/list",
    "/api/auth/delete-user",
    "/api/auth/sign-in/email/",
    "/api/auth//sign-in/email",
    "/api/auth",
  ])("does not answer %s: use-cases do that, with their audit", (path) => {
    expect(isOpenAuthPath(path)).toBe(false);
  });
});

describe("the client's address", () => {
  it.each([
    ["203.0.113.9", "203.0.113.9"],
    // A client can put anything in front; the last hop is the one our own proxy saw.
    ["6.6.6.6, 203.0.113.9", "203.0.113.9"],
    ["", "unknown"],
  ])("of %j is %s", (header, expected) => {
    expect(clientAddress(new Headers({ "x-forwarded-for": header }))).toBe(expected);
  });
});

describe("the settings", () => {
  const environment = { NODE_ENV: "production", BETTER_AUTH_SECRET: "s".repeat(32) } as const;
  it.each([
    ["http://127.0.0.1:3000", false, ["http://127.0.0.1:3000", "http://localhost:3000", "http://127.0.0.1:3000"]],
    ["https://solver.example.org", true, ["https://solver.example.org", "http://localhost", "http://127.0.0.1"]],
  ])("of %s make secure cookies: %s", (SADDLEMARK_BASE_URL, secure, trustedOrigins) => {
    expect(readAuthSettings({ ...environment, SADDLEMARK_BASE_URL })).toMatchObject({ secure, trustedOrigins });
  });

  it("are refused without an address or with a short secret", () => {
    expect(() => readAuthSettings(environment)).toThrow();
    expect(() => readAuthSettings({ ...environment, SADDLEMARK_BASE_URL: "http://127.0.0.1:3000", BETTER_AUTH_SECRET: "short" })).toThrow();
  });

  it.each([
    ["demonstration", "demonstration"],
    ["production", "production"],
    ["", "production"],
    ["demo", "production"],
  ])("mode %j counts as %s", (mode, expected) => {
    expect(readMode({ NODE_ENV: "production", SADDLEMARK_MODE: mode })).toBe(expected);
  });
});
