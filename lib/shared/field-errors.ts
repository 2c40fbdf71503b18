import type { z } from "zod";
import type { FieldError } from "./app-error";

/** Zod's issues as field errors with dotted paths; unknown keys get the path of the key itself. */
export function fieldErrorsOf(error: z.ZodError): FieldError[] {
  return error.issues.flatMap((issue) => {
    const path = issue.path.map(String);
    if (issue.code === "unrecognized_keys") {
      return issue.keys.map((key) => ({ path: [...path, key].join("."), message: "This field is not known." }));
    }
    return [{ path: path.join("."), message: plainMessage(issue) }];
  });
}

/** Sentences for refusals that a schema gave no words of its own. */
function plainMessage(issue: z.core.$ZodIssue): string {
  if (!/^(Invalid|Too) /.test(issue.message)) return issue.message;
  if (issue.code === "invalid_value") return `Choose one of: ${issue.values.map(String).join(", ")}.`;
  if (issue.code === "too_small") return issue.origin === "string" ? `Give at least ${issue.minimum} characters.` : `This must be ${issue.inclusive === false ? "more than" : "at least"} ${issue.minimum}.`;
  if (issue.code === "too_big") return issue.origin === "string" ? `Give at most ${issue.maximum} characters.` : `This must be at most ${issue.maximum}.`;
  if (issue.code === "invalid_type") return issue.message.endsWith("received undefined") ? `This is missing; give ${article(issue.expected)}.` : `This must be ${article(issue.expected)}.`;
  return issue.message;
}

function article(kind: string): string {
  return /^[aeio]/.test(kind) ? `an ${kind}` : `a ${kind}`;
}
