import { z } from "zod";
import { operations } from "@/lib/api/contract";
import type { Operation } from "@/lib/api/operation";
import { problemSchema, type Problem } from "@/lib/api/problem";
import { apiMethods, type RouteHandler } from "@/lib/api/route";
import type { Role } from "@/lib/auth/permissions";
import { createKey } from "@/lib/use-cases/team/create-key";
import { inviteMember } from "@/lib/use-cases/team/invite-member";
import { registerPerson } from "@/lib/use-cases/team/register-person";
import { actorOfAccount, headersWith, signInAs, startInstallation, testBaseUrl, testPassword, type Installation } from "./accounts";

/** Who calls: a role of our team, the owner of another one, our team's keys, or nobody. */
export type Caller = Role | "foreigner" | "read-key" | "write-key" | "nobody";

export type Answer = { status: number; headers: Headers; text: string; json: () => unknown; problem: () => Problem };
export type CallOptions = { as?: Caller; body?: unknown; rawBody?: BodyInit; headers?: Record<string, string> };

export type ApiWorld = Installation & {
  teamId: string;
  call: (method: string, path: string, options?: CallOptions) => Promise<Answer>;
  /** The same, insisting on a status; returns the parsed JSON. */
  expect: <Schema extends z.ZodType>(status: number, schema: Schema, method: string, path: string, options?: CallOptions) => Promise<z.output<Schema>>;
};

/** Two teams with everyone of every role, and the API called through its own route handlers, real cookies and real keys. */
export async function startApiWorld(): Promise<ApiWorld> {
  const installation = await startInstallation();
  const request = { headers: headersWith() };
  await registerPerson(request, { name: "Olive Owner", email: "owner@example.org", password: testPassword, teamName: "Reed team" });
  await registerPerson(request, { name: "Fay Foreign", email: "foreigner@example.org", password: testPassword, teamName: "Stone team" });
  const owner = await actorOfAccount("owner@example.org");
  for (const role of ["curator", "analyst", "observer"] as const) {
    const email = `${role}@example.org`;
    const { invitationId } = await inviteMember(owner, { email, role });
    await registerPerson(request, { name: `The ${role}`, email, password: testPassword, invitationId });
    await installation.owner.query("delete from throttle");
  }
  const headers = await callerHeaders(owner);
  const call = (method: string, path: string, options: CallOptions = {}) => send(headers, method, path, options);
  return {
    ...installation,
    teamId: owner.teamId,
    call,
    expect: async (status, schema, method, path, options) => {
      const answer = await call(method, path, options);
      if (answer.status !== status) throw new Error(`${method} ${path}: ${answer.status} instead of ${status}: ${answer.text.slice(0, 600)}`);
      return schema.parse(answer.json());
    },
  };
}

async function callerHeaders(owner: Awaited<ReturnType<typeof actorOfAccount>>): Promise<Record<Caller, Headers>> {
  const keyHeaders = async (scope: "read" | "write") => headersWith({ bearer: (await createKey(owner, { name: `${scope} key`, scope })).key });
  return {
    owner: await signInAs("owner@example.org"),
    curator: await signInAs("curator@example.org"),
    analyst: await signInAs("analyst@example.org"),
    observer: await signInAs("observer@example.org"),
    foreigner: await signInAs("foreigner@example.org"),
    "read-key": await keyHeaders("read"),
    "write-key": await keyHeaders("write"),
    nobody: headersWith(),
  };
}

async function send(callers: Record<Caller, Headers>, method: string, path: string, options: CallOptions): Promise<Answer> {
  const headers = new Headers(callers[options.as ?? "owner"]);
  const body = options.rawBody ?? (options.body === undefined ? undefined : JSON.stringify(options.body));
  if (options.body !== undefined) headers.set("content-type", "application/json");
  for (const [name, value] of Object.entries(options.headers ?? {})) headers.set(name, value);
  const streamed = body instanceof ReadableStream ? { duplex: "half" } : {};
  const response = await dispatch(new Request(`${testBaseUrl}${path}`, { method, headers, ...(body === undefined ? {} : { body }), ...streamed }));
  const text = await response.text();
  return {
    status: response.status,
    headers: response.headers,
    text,
    json: (): unknown => JSON.parse(text),
    problem: () => problemSchema.parse(JSON.parse(text)),
  };
}

const handlersSchema = z.object({ GET: z.custom<RouteHandler>(), POST: z.custom<RouteHandler>(), PATCH: z.custom<RouteHandler>(), PUT: z.custom<RouteHandler>(), DELETE: z.custom<RouteHandler>() });
const files = import.meta.glob("../../app/api/v1/**/route.ts");

/** Finds the route file as Next does: literal parts before parameters, and the catch-all last. */
async function dispatch(request: Request): Promise<Response> {
  const { pathname } = new URL(request.url);
  const parts = pathname.split("/").slice(1);
  const matches = Object.keys(files).flatMap((file) => {
    const names = file.replace("../../app/", "").replace("/route.ts", "").split("/");
    const params = matchParts(names, parts);
    return params === null ? [] : [{ file, params, wild: names.filter((name) => name.startsWith("[")).length + (names.at(-1) === "[[...path]]" ? 100 : 0) }];
  });
  const [best] = matches.sort((a, b) => a.wild - b.wild);
  if (best === undefined) throw new Error(`No route file for ${pathname}.`);
  const handlers = handlersSchema.parse(await files[best.file]?.());
  const handler = Object.entries(handlers).find(([method]) => method === request.method)?.[1] ?? apiMethods({}).GET;
  return handler(request, { params: Promise.resolve(best.params) });
}

function matchParts(names: readonly string[], parts: readonly string[]): Record<string, string> | null {
  if (names.at(-1) === "[[...path]]") return names.slice(0, -1).every((name, index) => name === parts[index]) ? {} : null;
  if (names.length !== parts.length) return null;
  const params: Record<string, string> = {};
  for (const [index, name] of names.entries()) {
    const part = decodeURIComponent(parts[index] ?? "");
    if (name.startsWith("[")) params[name.slice(1, -1)] = part;
    else if (name !== part) return null;
  }
  return params;
}

export const allOperations: readonly Operation[] = Object.values(operations);

/** A path with its parameters filled in, in their order. */
export function fillPath(operation: Operation, values: Readonly<Record<string, string>>): string {
  return operation.path.replace(/\{(\w+)\}/g, (_braces, name: string) => encodeURIComponent(values[name] ?? "missing"));
}

export const createdCase = operations.createCase.response.schema;
export const recordedRun = operations.recordRun.response.schema;
