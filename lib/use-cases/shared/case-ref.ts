import type { CaseRef } from "@/db/queries/cases";
import { AppError } from "@/lib/shared/app-error";

/** A case by its UUID or its number, as text of an address. */
export function caseRefOf(text: string): CaseRef {
  return /^\d+$/.test(text) ? { number: Number(text) } : { id: text };
}

/** The same answer for a case that is not there and for one of another team. */
export function caseNotFound(): AppError {
  return new AppError("not-found", "This team has no such case.");
}
