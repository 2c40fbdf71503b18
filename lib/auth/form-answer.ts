import type { FieldError } from "@/lib/shared/app-error";

/** What a form's action answers: what was made, or what is wrong and at which field. Safe for the browser. */
export type FormResult<Value = undefined> = { ok: true; value: Value } | { ok: false; message: string; fields: readonly FieldError[] };
