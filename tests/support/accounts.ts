import pg from "pg";
import { closeDatabases } from "@/db/client";
import { actorFromHeaders } from "@/lib/auth/actor";
import type { Actor } from "@/lib/auth/guard";
import { getAuth } from "@/lib/auth/auth";
import { createTestDatabase } from "./database";

export const testBaseUrl = "http://127.0.0.1:3999";
export const testPassword = "correct horse battery";

export type Installation = { owner: pg.Client; close: () => Promise<void> };

/** A fresh installation in a database of its own, with the environment that the application reads. One for each test file. */
export async function startInstallation(): Promise<Installation> {
  const database = await createTestDatabase();
  Object.assign(process.env, {
    DATABASE_URL_APP: database.appUrl,
    DATABASE_URL_AUTH: database.authUrl,
    SADDLEMARK_BASE_URL: testBaseUrl,
    SADDLEMARK_MODE: "test",
    BETTER_AUTH_SECRET: "a-secret-of-the-tests-3f9c1d7e5b2a8046",
  });
  const owner = new pg.Client({ connectionString: database.ownerUrl });
  await owner.connect();
  const close = async () => {
    await owner.end();
    await closeDatabases();
    await database.drop();
  };
  return { owner, close };
}

/** Headers of a request from `address`, with the cookies of an answer where given. */
export function headersWith(options: { setCookie?: readonly string[]; bearer?: string; address?: string } = {}): Headers {
  const headers = new Headers({ "x-forwarded-for": options.address ?? "192.0.2.1" });
  if (options.setCookie) headers.set("cookie", options.setCookie.map((cookie) => cookie.split(";")[0]).join("; "));
  if (options.bearer !== undefined) headers.set("authorization", `Bearer ${options.bearer}`);
  return headers;
}

/** Signs in and returns the headers of the session. Throws as better-auth does. */
export async function signInAs(email: string, password = testPassword): Promise<Headers> {
  const { headers } = await getAuth().api.signInEmail({ body: { email, password }, headers: headersWith(), returnHeaders: true });
  return headersWith({ setCookie: headers.getSetCookie() });
}

/** The actor of a new session of this account. Throws when there is none. */
export async function actorOfAccount(email: string): Promise<Actor> {
  const actor = await actorFromHeaders(await signInAs(email));
  if (!actor) throw new Error(`${email} is in no team.`);
  return actor;
}
