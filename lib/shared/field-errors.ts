import type { z } from "zod";
import type { FieldError } from "./app-error";

/** Zod's issues as field errors with dotted paths; unknown keys get the path of the key itself. */
export function fieldErrorsOf(error: z.ZodError): FieldError[] {
  return error.issues.flatMap((issue) => {
    const path = issue.path.map(String);
    if (issue.code === "unrecognized_keys") {
      return issue.keys.map((key) => ({ path: [...path, key].join("."), message: "This field is not known." }));
    }
    return [{ path: path.join("."), message: issue.message }];
  });
}
