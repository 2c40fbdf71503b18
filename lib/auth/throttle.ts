import { authDatabase } from "@/db/client";
import { countAttempt, forgetAttempts, pruneAttempts, takeBackAttempt } from "@/db/queries/throttle";

type Limit = { kind: string; what: string; attempts: number; windowSeconds: number; shared: boolean };

/**
 * Limits by better-auth's path. The account limits hold whatever address the guesses come from; `shared` ones count a whole
 * address, where a success must not wipe out the failures beside it. Common practice, no source for the numbers.
 */
const limits: Record<string, readonly Limit[]> = {
  "/sign-in/email": [
    { kind: "sign-in", what: "for this account from here", attempts: 5, windowSeconds: 60, shared: false },
    { kind: "sign-in-account", what: "for this account", attempts: 10, windowSeconds: 300, shared: false },
    { kind: "sign-in-address", what: "from this address", attempts: 100, windowSeconds: 300, shared: true },
  ],
  "/request-password-reset": [
    { kind: "reset-account", what: "for this account", attempts: 3, windowSeconds: 300, shared: false },
    { kind: "reset-address", what: "from this address", attempts: 30, windowSeconds: 300, shared: true },
  ],
  "/reset-password": [{ kind: "new-password-address", what: "from this address", attempts: 30, windowSeconds: 300, shared: true }],
  "/change-password": [{ kind: "change-address", what: "from this address", attempts: 30, windowSeconds: 300, shared: true }],
  "/sign-up/email": [{ kind: "sign-up-address", what: "from this address", attempts: 60, windowSeconds: 300, shared: true }],
};

export type Attempt = { path: string; email: string; address: string };
export type Refusal = { message: string; secondsLeft: number };

/** Counts an attempt before its password is looked at. Returns a refusal, in words for the person, when one limit is reached. */
export async function beginAttempt(attempt: Attempt): Promise<Refusal | null> {
  const db = authDatabase();
  for (const limit of limits[attempt.path] ?? []) {
    const { attempts, secondsLeft } = await countAttempt(db, keyOf(limit, attempt), limit.windowSeconds);
    if (attempts === 1) await pruneAttempts(db);
    if (attempts > limit.attempts) {
      return { message: `Too many attempts ${limit.what}. Wait ${secondsLeft} s, then try again.`, secondsLeft };
    }
  }
  return null;
}

/** After a right password: the account starts afresh, the address gets back this one attempt. */
export async function forgiveAttempt(attempt: Attempt): Promise<void> {
  const db = authDatabase();
  for (const limit of limits[attempt.path] ?? []) {
    if (limit.shared) await takeBackAttempt(db, keyOf(limit, attempt));
    else await forgetAttempts(db, keyOf(limit, attempt));
  }
}

function keyOf(limit: Limit, { email, address }: Attempt): string {
  const account = email.trim().toLowerCase().slice(0, 320);
  if (limit.shared) return `${limit.kind}:${address}`;
  return limit.kind === "sign-in" ? `${limit.kind}:${account}:${address}` : `${limit.kind}:${account}`;
}
