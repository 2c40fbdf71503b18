import { z } from "zod";
import { actorFromHeaders } from "@/lib/auth/actor";
import { authorise, type Actor, type UseCase } from "@/lib/auth/guard";
import { readAuthSettings } from "@/lib/auth/settings";
import { AppError, type FieldError } from "@/lib/shared/app-error";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import type { Method, Operation, RequestParts, ResponseContent } from "./operation";
import { isStorable, readJson } from "./read-body";
import { failureResponse, jsonResponse } from "./responses";

type RouteContext = { params: Promise<Record<string, string | string[] | undefined>> };
export type RouteHandler = (request: Request, context: RouteContext) => Promise<Response>;

export type Answer<Op extends Operation> = { content: ResponseContent<Op>; status?: number };

type Adapter<Op extends Operation, Output> = {
  /** From the checked request to the use-case's input. */
  input: (parts: RequestParts<Op>) => unknown;
  /** From the use-case's output to what is sent. */
  answer: (output: Output) => Answer<Op>;
};

/**
 * The handler of one call: who asks, may they, is the request well formed, do it, check the answer against its schema.
 * Every failure leaves as problem details. Throws at once when operation and use-case ask for different permissions.
 */
export function apiRoute<Op extends Operation, Input extends z.ZodType, Output>(
  operation: Op,
  useCase: UseCase<Input, Output>,
  adapter: Adapter<Op, Output>,
): RouteHandler {
  if (operation.permission !== useCase.permission) throw new Error(`${operation.id} and its use-case name different permissions.`);
  return async (request, context) => {
    try {
      const actor = await requestActor(request);
      authorise(actor, operation.permission);
      const parts = await readParts(operation, request, await context.params);
      return send(operation, adapter.answer(await useCase(actor, adapter.input(parts))));
    } catch (error) {
      return failureResponse(error, operation.id);
    }
  };
}

function send<Op extends Operation>(operation: Op, { content, status = operation.status }: Answer<Op>): Response {
  if (content instanceof Response) return content;
  const { response } = operation;
  return jsonResponse(response.kind === "json" ? response.schema.parse(content) : content, status);
}

async function requestActor(request: Request): Promise<Actor | null> {
  refuseForeignOrigin(request);
  return actorFromHeaders(request.headers);
}

/** A browser sends its cookie along with other sites' requests too, and then names the site: such requests change nothing here. */
function refuseForeignOrigin(request: Request): void {
  if (request.method === "GET" || request.method === "HEAD" || request.headers.has("authorization")) return;
  const origin = request.headers.get("origin");
  const site = request.headers.get("sec-fetch-site");
  const foreign = origin === null ? site !== null && site !== "same-origin" && site !== "none" : !readAuthSettings().trustedOrigins.includes(origin);
  if (foreign) throw new AppError("forbidden", "This request comes from another site.");
}

async function readParts<Op extends Operation>(operation: Op, request: Request, params: Awaited<RouteContext["params"]>): Promise<RequestParts<Op>> {
  const parts = {
    params: readParams(operation, params),
    query: readQuery(operation, new URL(request.url).searchParams),
    body: await readRequestBody(operation, request),
    idempotencyKey: readIdempotencyKey(operation, request.headers),
    request,
  };
  return checkedParts<Op>(parts);
}

/** The one place where what was parsed with an operation's schemas takes the operation's types: they depend on it generically. */
function checkedParts<Op extends Operation>(parts: { [Part in keyof RequestParts<Op>]: unknown }): RequestParts<Op> {
  const typed: unknown = parts;
  return typed as RequestParts<Op>;
}

/** An id that can't be one belongs to nothing: not found, the same as an unknown or foreign one. A path without parameters comes without any. */
function readParams(operation: Operation, params: Awaited<RouteContext["params"]> | undefined): unknown {
  const parsed = (operation.params ?? z.strictObject({})).safeParse(params ?? {});
  if (!parsed.success) throw new AppError("not-found", "There is nothing at this address.");
  return parsed.data;
}

function readQuery(operation: Operation, search: URLSearchParams): unknown {
  const fields: FieldError[] = [];
  const given: Record<string, string> = {};
  for (const [name, value] of search) {
    if (Object.hasOwn(given, name)) fields.push({ path: name, message: "This parameter is given twice." });
    if (!isStorable(name) || !isStorable(value)) fields.push({ path: name, message: "This text holds a character that can't be used." });
    Object.defineProperty(given, name, { value, enumerable: true, configurable: true, writable: true });
  }
  const parsed = (operation.query ?? z.strictObject({})).safeParse(given);
  if (!parsed.success) fields.push(...fieldErrorsOf(parsed.error));
  if (fields.length > 0) throw new AppError("invalid", "Some query parameters can't be used.", { fields });
  return parsed.data;
}

async function readRequestBody(operation: Operation, request: Request): Promise<unknown> {
  if (operation.body === null) return null;
  const mediaType = (request.headers.get("content-type") ?? "").split(";")[0]?.trim().toLowerCase() ?? "";
  const accepted: readonly string[] = operation.body.kind === "json" ? ["application/json"] : operation.body.mediaTypes;
  if (!accepted.includes(mediaType)) throw new AppError("unsupported-media", `Send ${accepted.join(" or ")} and name it in Content-Type.`);
  if (operation.body.kind === "stream") return null;
  const parsed = operation.body.schema.safeParse(await readJson(request));
  if (!parsed.success) throw new AppError("invalid", "Some fields can't be used.", { fields: fieldErrorsOf(parsed.error) });
  return parsed.data;
}

function readIdempotencyKey(operation: Operation, headers: Headers): string | null {
  const key = headers.get("idempotency-key");
  if (key === null || !operation.idempotent) return null;
  if (/^[\x21-\x7e]{1,200}$/.test(key)) return key;
  throw new AppError("invalid", "The Idempotency-Key can't be used.", {
    fields: [{ path: "Idempotency-Key", message: "Use 1 to 200 visible ASCII characters without spaces." }],
  });
}

type AnyMethod = Method | "PUT";

/** What a route file exports: the given handlers, and 405 as problem details for the other methods. */
export function apiMethods(handlers: Partial<Record<Method, RouteHandler>>): Record<AnyMethod, RouteHandler> {
  const allowed = Object.keys(handlers).join(", ");
  const refuse: RouteHandler = async (request) => {
    const response = failureResponse(new AppError("method-not-allowed", `${request.method} is not possible here; use ${allowed}.`), "method");
    response.headers.set("allow", allowed);
    return response;
  };
  return { PUT: refuse, GET: handlers.GET ?? refuse, POST: handlers.POST ?? refuse, PATCH: handlers.PATCH ?? refuse, DELETE: handlers.DELETE ?? refuse };
}
