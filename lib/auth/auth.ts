import { apiKey } from "@better-auth/api-key";
import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { APIError, createAuthMiddleware, isAPIError } from "better-auth/api";
import { nextCookies } from "better-auth/next-js";
import { organization } from "better-auth/plugins/organization";
import { z } from "zod";
import { authDatabase } from "@/db/client";
import * as schema from "@/db/schema";
import { resetEmail } from "@/lib/email/reset-email";
import { enqueue } from "@/lib/jobs/queue";
import { clientAddress } from "./client-address";
import { passwordMaxLength, passwordMinLength } from "./account-schemas";
import { readAuthSettings, type AuthSettings } from "./settings";
import { teamAccess, teamRoles } from "./team-access";
import { beginAttempt, forgiveAttempt, type Attempt } from "./throttle";

export type Auth = ReturnType<typeof createAuth>;

let current: Auth | undefined;

/** The better-auth server; made at the first call, because a build has neither database nor secret. */
export function getAuth(): Auth {
  return (current ??= createAuth(readAuthSettings()));
}

export const keyPrefix = "sdm_";
const resetSeconds = 3600;
const daySeconds = 86_400;

function createAuth(settings: AuthSettings) {
  return betterAuth({
    appName: "Saddlemark",
    baseURL: settings.baseUrl,
    secret: settings.secret,
    trustedOrigins: settings.trustedOrigins,
    telemetry: { enabled: false },
    logger: { level: "warn", log: logUnlessExpected },
    onAPIError: { onError: logFault },
    database: drizzleAdapter(authDatabase(), { provider: "pg", schema }),
    session: { expiresIn: 30 * daySeconds, updateAge: daySeconds },
    advanced: { cookiePrefix: "saddlemark", useSecureCookies: settings.secure, ipAddress: { ipAddressHeaders: ["x-forwarded-for"] } },
    emailAndPassword: {
      enabled: true,
      minPasswordLength: passwordMinLength,
      maxPasswordLength: passwordMaxLength,
      resetPasswordTokenExpiresIn: resetSeconds,
      revokeSessionsOnPasswordReset: true,
      sendResetPassword: async ({ user, token }) => {
        const url = new URL("/reset-password", settings.baseUrl);
        url.searchParams.set("token", token);
        await enqueue(authDatabase(), "send-email", resetEmail({ to: user.email, name: user.name, url: url.href, minutes: resetSeconds / 60 }));
      },
    },
    // Guessing is throttled below, by account as well as by address and for form posts as for calls; this one only stops floods.
    rateLimit: { enabled: true, storage: "memory", window: 60, max: 600, customRules: floodRules },
    hooks: { before: refuseGuessing, after: forgiveSuccess },
    plugins: [
      organization({
        ac: teamAccess,
        roles: teamRoles,
        creatorRole: "owner",
        // Teams are made by the register-person and create-team use-cases, which also give them their first edition.
        allowUserToCreateOrganization: false,
        disableOrganizationDeletion: true,
      }),
      apiKey({
        defaultPrefix: keyPrefix,
        enableMetadata: true,
        requireName: true,
        maximumNameLength: 60,
        startingCharactersConfig: { charactersLength: 10 },
        rateLimit: { enabled: false },
      }),
      nextCookies(),
    ],
  });
}

/** better-auth's own rule for signing in is 3 in 10 seconds for a whole address, right passwords included: too few for an office. */
const floodRules = Object.fromEntries(
  ["/sign-in/email", "/sign-up/email", "/request-password-reset", "/reset-password", "/change-password"].map((path) => [path, { window: 60, max: 120 }]),
);

const refuseGuessing = createAuthMiddleware(async (context) => {
  const refusal = await beginAttempt(attemptOf(context));
  if (refusal) {
    throw new APIError("TOO_MANY_REQUESTS", { code: "TOO_MANY_ATTEMPTS", message: refusal.message }, { "Retry-After": String(refusal.secondsLeft) });
  }
});

const forgiveSuccess = createAuthMiddleware(async (context) => {
  // A reset mail is limited however it ends: every one is a letter to somebody.
  if (context.path === "/request-password-reset" || isAPIError(context.context.returned)) return;
  await forgiveAttempt(attemptOf(context));
});

const bodySchema = z.object({ email: z.string() });

function attemptOf(context: { path?: string; body?: unknown; headers?: Headers }): Attempt {
  const body = bodySchema.safeParse(context.body);
  return { path: context.path ?? "", email: body.success ? body.data.email : "", address: clientAddress(context.headers) };
}

const expectedMessages = [/^Failed to validate API key/, /^User not found/, /^Invalid password/, /^Reset Password: User not found/, /^Sign-up attempt/];

/** A refusal is an answer; only faults of our own are worth a line. */
function logFault(error: unknown): void {
  if (isAPIError(error) && error.statusCode < 500) return;
  console.error("auth:", error instanceof Error ? error.message : "unknown fault");
}

/** Wrong passwords and bad keys are everyday answers, not events for the log. */
function logUnlessExpected(level: string, message: string, ...details: unknown[]): void {
  if (expectedMessages.some((pattern) => pattern.test(message))) return;
  const write = level === "error" ? console.error : console.warn;
  write(`auth: ${message}`, ...details.map((detail) => (detail instanceof Error ? detail.message : typeof detail)));
}
