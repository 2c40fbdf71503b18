import type { FieldError } from "@/lib/shared/app-error";

/** A refusal of the API as problem details (RFC 9457), for the screen that asked. Status 0: the server was not reached. */
export class ApiProblem extends Error {
  readonly status: number;
  readonly fields: readonly FieldError[];

  constructor(status: number, message: string, fields: readonly FieldError[] = []) {
    super(message);
    this.name = "ApiProblem";
    this.status = status;
    this.fields = fields;
  }
}

type Call = { method?: "GET" | "POST" | "PATCH" | "DELETE"; body?: unknown; /** Sent as it is instead of `body`. */ file?: Blob; idempotencyKey?: string; signal?: AbortSignal };

async function send(path: string, { method = "GET", body, file, idempotencyKey, signal }: Call): Promise<Response> {
  const headers = new Headers({ accept: "application/json, text/plain" });
  if (body !== undefined) headers.set("content-type", "application/json");
  if (file !== undefined) headers.set("content-type", "application/octet-stream");
  if (idempotencyKey !== undefined) headers.set("idempotency-key", idempotencyKey);
  const init: RequestInit = { method, headers, credentials: "same-origin" };
  if (body !== undefined) init.body = JSON.stringify(body);
  if (file !== undefined) init.body = file;
  if (signal !== undefined) init.signal = signal;
  const response = await fetch(`/api/v1${path}`, init).catch((cause: unknown) => {
    if (signal?.aborted) throw cause;
    throw new ApiProblem(0, "The server can't be reached. Nothing was lost; try again in a moment.");
  });
  if (!response.ok) throw await problemOf(response);
  return response;
}

/** Calls the API of this origin. The answer was checked against its schema where it was made. Throws ApiProblem. */
export async function callApi<Answer>(path: string, call: Call = {}): Promise<Answer> {
  const response = await send(path, call);
  return response.json();
}

async function problemOf(response: Response): Promise<ApiProblem> {
  const body: unknown = await response.json().catch(() => null);
  const problem: Partial<{ title: unknown; detail: unknown; errors: unknown }> = typeof body === "object" && body !== null ? body : {};
  const message = [problem.detail, problem.title].find((text): text is string => typeof text === "string");
  return new ApiProblem(response.status, message ?? `The server answered ${response.status}.`, fieldsOf(problem.errors));
}

function fieldsOf(errors: unknown): FieldError[] {
  if (!Array.isArray(errors)) return [];
  return errors.flatMap((error: Partial<FieldError>) => (typeof error.path === "string" && typeof error.message === "string" ? [{ path: error.path, message: error.message }] : []));
}

/** What to tell a person about a failed call. */
export function problemText(error: unknown): string {
  return error instanceof ApiProblem ? error.message : "Something went wrong in the browser. Reload the page; what was saved is kept.";
}

/** A key that makes a retried call harmless. */
export function newIdempotencyKey(): string {
  return crypto.randomUUID();
}

/** "?a=1&b=2" from what is set; "" for nothing. */
export function searchString(parameters: Readonly<Record<string, string | number | undefined>>): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(parameters)) if (value !== undefined && value !== "") search.set(name, String(value));
  const text = search.toString();
  return text === "" ? "" : `?${text}`;
}
