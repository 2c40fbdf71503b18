/** Closed set of expected failures; the HTTP status of each stands in `httpStatus`. */
export const errorCodes = [
  "malformed",
  "unauthenticated",
  "forbidden",
  "not-found",
  "method-not-allowed",
  "conflict",
  "too-large",
  "unsupported-media",
  "invalid",
  "too-many-requests",
  "unavailable",
] as const;
export type ErrorCode = (typeof errorCodes)[number];

export const httpStatus: Record<ErrorCode, number> = {
  malformed: 400,
  unauthenticated: 401,
  forbidden: 403,
  "not-found": 404,
  "method-not-allowed": 405,
  conflict: 409,
  "too-large": 413,
  "unsupported-media": 415,
  invalid: 422,
  "too-many-requests": 429,
  unavailable: 503,
};

/** One problem at one place of the input; `path` such as "questionnaire.size.value", "" for the whole. */
export type FieldError = { path: string; message: string };

/** Expected failure: a closed code, a sentence for the person, details for the log only. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly fields: readonly FieldError[];
  readonly detail: string | undefined;

  constructor(code: ErrorCode, message: string, options: { fields?: readonly FieldError[]; detail?: string; cause?: unknown } = {}) {
    super(message, { cause: options.cause });
    this.name = "AppError";
    this.code = code;
    this.fields = options.fields ?? [];
    this.detail = options.detail;
  }
}
