import { z } from "zod";
import { AppError, errorCodes, httpStatus, type ErrorCode } from "@/lib/shared/app-error";

/** Problem details (RFC 9457) with the fields at fault. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })),
});
export type Problem = z.infer<typeof problemSchema>;

export const problemMediaType = "application/problem+json";
const typePrefix = "urn:saddlemark:problem:";

const titles: Record<ErrorCode, string> = {
  malformed: "Malformed request",
  unauthenticated: "Not signed in",
  forbidden: "Not allowed",
  "not-found": "Not found",
  "method-not-allowed": "Method not allowed",
  conflict: "Conflict",
  "too-large": "Too large",
  "unsupported-media": "Unsupported media type",
  invalid: "Invalid content",
  "too-many-requests": "Too many requests",
  unavailable: "Unavailable",
};

export function problemOf(error: AppError): Problem {
  return {
    type: typePrefix + error.code,
    title: titles[error.code],
    status: httpStatus[error.code],
    detail: error.message,
    errors: error.fields.map(({ path, message }) => ({ path, message })),
  };
}

/** The closed code behind a problem, null for one that isn't ours. */
export function codeOfProblem(problem: Pick<Problem, "type">): ErrorCode | null {
  return errorCodes.find((code) => problem.type === typePrefix + code) ?? null;
}

/** What an unexpected failure shows: nothing of its message. */
export const unexpectedProblem: Problem = {
  type: "about:blank",
  title: "Internal error",
  status: 500,
  detail: "Something failed on the server. Nothing was saved; try again.",
  errors: [],
};
