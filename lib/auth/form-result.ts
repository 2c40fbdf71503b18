import { AppError } from "@/lib/shared/app-error";
import { appErrorOf } from "./auth-errors";
import type { FormResult } from "./form-answer";

/** Runs an action's work; expected failures become sentences, others are logged and told without their details. */
export async function formResult<Value>(work: () => Promise<Value>): Promise<FormResult<Value>> {
  try {
    return { ok: true, value: await work() };
  } catch (raised) {
    const error = appErrorOf(raised);
    if (error instanceof AppError) return { ok: false, message: error.message, fields: error.fields };
    console.error("A form's action failed:", error);
    return { ok: false, message: "This did not work because of a fault here, not of your answers. Try again in a minute.", fields: [] };
  }
}

/** A form's text fields as an object for zod; files and repeated fields have no place in these forms. */
export function fieldsOf(data: FormData): Record<string, string> {
  // Next adds fields of its own to a form's data; their names begin with $ACTION.
  const entries = [...data.entries()].filter((entry): entry is [string, string] => typeof entry[1] === "string" && !entry[0].startsWith("$"));
  return Object.fromEntries(entries);
}
