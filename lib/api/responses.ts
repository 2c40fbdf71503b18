import { AppError } from "@/lib/shared/app-error";
import { problemMediaType, problemOf, unexpectedProblem, type Problem } from "./problem";

/** On every answer of the API: it is private to one team and never a page. */
export const apiHeaders = {
  "cache-control": "no-store",
  "x-content-type-options": "nosniff",
  "content-security-policy": "default-src 'none'; frame-ancestors 'none'",
  "referrer-policy": "no-referrer",
} as const;

export function jsonResponse(body: unknown, status: number, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(body), { status, headers: { ...apiHeaders, "content-type": "application/json; charset=utf-8", ...headers } });
}

export function problemResponse(problem: Problem, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(problem), { status: problem.status, headers: { ...apiHeaders, "content-type": problemMediaType, ...headers } });
}

/** Any failure as problem details. Unexpected ones are logged, with their stack and without the request, and show nothing of themselves. */
export function failureResponse(error: unknown, place: string): Response {
  if (error instanceof AppError) {
    if (error.cause !== undefined) logFailure(place, error.cause);
    return problemResponse(problemOf(error), error.code === "unauthenticated" ? { "www-authenticate": 'Bearer realm="saddlemark"' } : {});
  }
  if (isOutOfService(error)) {
    logFailure(place, error);
    return problemResponse(problemOf(new AppError("unavailable", "The database can't be reached just now; try again in a moment.")), { "retry-after": "5" });
  }
  logFailure(place, error);
  return problemResponse(unexpectedProblem);
}

/** Connection refused or reset, and the classes of PostgreSQL's codes for a server that is starting, stopping or out of connections. */
const outOfServiceCode = /^(ECONNREFUSED|ECONNRESET|EPIPE|ETIMEDOUT|57P0\d|53\d{3}|08\d{3})$/;

/** What the driver and its pool say, without a code, when nobody answers or no connection gets free. */
const connectionTimedOut = /timeout exceeded when trying to connect|due to connection timeout|^timeout expired$/;

function isOutOfService(error: unknown): boolean {
  for (let step = error, depth = 0; step instanceof Error && depth < 5; step = step.cause, depth++) {
    if ("code" in step && typeof step.code === "string" && outOfServiceCode.test(step.code)) return true;
    if (connectionTimedOut.test(step.message)) return true;
  }
  return false;
}

/** A failed statement's message holds its parameters, which may be anything a person wrote: only its cause and code are logged. */
function logFailure(place: string, error: unknown): void {
  console.error(`api: ${place} failed: ${describe(error)}`);
}

function describe(error: unknown): string {
  if (!(error instanceof Error)) return typeof error;
  if (error.message.startsWith("Failed query")) return `query failed; ${error.cause === undefined ? "no cause" : describe(error.cause)}`;
  const code = "code" in error && typeof error.code === "string" ? ` [${error.code}]` : "";
  const stack = (error.stack ?? "").split("\n").slice(1, 6).join("\n");
  return `${error.name}${code}: ${error.message}\n${stack}`;
}
