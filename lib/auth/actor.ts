import { cookies as requestCookies, headers as requestHeaders } from "next/headers";
import { redirect } from "next/navigation";
import { cache } from "react";
import { z } from "zod";
import { authDatabase } from "@/db/client";
import { findKeyHolder, listMemberships, type Membership } from "@/db/queries/team-memberships";
import { getAuth, keyPrefix } from "./auth";
import type { Actor, SignedIn } from "./guard";

/** A signed-in person, with or without a team. */
export type Person = SignedIn & { activeTeamId: string | null; teams: Membership[] };

/**
 * Who sends a request: the holder of the bearer key if there is one, else the person of the session cookie with the active team.
 * Null for a bad or revoked key, for no session, and for somebody who is in no team (any more). A bad key never falls back to the cookie.
 */
export async function actorFromHeaders(headers: Headers): Promise<Actor | null> {
  const authorization = headers.get("authorization");
  if (authorization !== null) return actorFromKey(authorization);
  const person = await personFromHeaders(headers);
  return person ? actorOf(person) : null;
}

/** The person of the session cookie, also without any team; null when signed out. */
export async function personFromHeaders(headers: Headers): Promise<Person | null> {
  // A page can't set cookies, so reading never prolongs a session: signing in does.
  const found = await getAuth().api.getSession({ headers: new Headers({ cookie: headers.get("cookie") ?? "" }), query: { disableRefresh: true } });
  if (!found) return null;
  return {
    userId: found.user.id,
    userName: found.user.name,
    userEmail: found.user.email,
    sessionToken: found.session.token,
    activeTeamId: found.session.activeOrganizationId ?? null,
    teams: await listMemberships(authDatabase(), found.user.id),
  };
}

/**
 * The person who asks for the present page; looked up once for all its parts. By Next's cookies and not by the header: after an
 * action that began a new session, the page is rendered in the same request, whose header still names the old one.
 */
export const currentPerson = cache(async (): Promise<Person | null> => personFromHeaders(new Headers({ cookie: (await requestCookies()).toString() })));

/** For signed-in pages: the actor, or a redirect to sign in (and back) or, without a team, to making one. */
export async function requireActor(): Promise<Actor> {
  const person = await currentPerson();
  if (!person) redirect(`/sign-in?next=${encodeURIComponent((await requestHeaders()).get("x-pathname") ?? "/cases")}`);
  const actor = actorOf(person);
  if (!actor) redirect("/register/team");
  return actor;
}

/** The person acting for the active team; for the one joined first when none is chosen or the chosen one was left. */
export function actorOf(person: Person): Actor | null {
  const team = person.teams.find(({ teamId }) => teamId === person.activeTeamId) ?? person.teams[0];
  if (!team) return null;
  const { userId, userName, userEmail } = person;
  return { userId, userName, userEmail, teamId: team.teamId, teamName: team.teamName, role: team.role, via: { kind: "session" } };
}

const keyMetadataSchema = z.object({ teamId: z.string().min(1), scope: z.enum(["read", "write"]) });

async function actorFromKey(authorization: string): Promise<Actor | null> {
  const key = /^Bearer\s+(\S+)$/i.exec(authorization)?.[1];
  if (!key?.startsWith(keyPrefix) || key.length > 200) return null;
  const checked = await getAuth().api.verifyApiKey({ body: { key } });
  if (!checked.valid || !checked.key) return null;
  const metadata = keyMetadataSchema.safeParse(checked.key.metadata);
  if (!metadata.success) return null;
  // The key can do what its maker may do now, not what they might do when it was made.
  const holder = await findKeyHolder(authDatabase(), { userId: checked.key.referenceId, teamId: metadata.data.teamId });
  if (!holder) return null;
  const { userId, userName, userEmail, teamId, teamName, role } = holder;
  return { userId, userName, userEmail, teamId, teamName, role, via: { kind: "key", keyId: checked.key.id, scope: metadata.data.scope } };
}
