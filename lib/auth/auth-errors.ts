import { isAPIError } from "better-auth/api";
import { z } from "zod";
import { AppError, type FieldError } from "@/lib/shared/app-error";

const bodySchema = z.object({ code: z.string().optional(), message: z.string().optional() });

/** What a person is told for better-auth's codes; all else is not for their eyes. */
const sentences: Record<string, { path: string; message: string }> = {
  INVALID_EMAIL_OR_PASSWORD: { path: "", message: "No account has this e-mail address and password. Check both, or choose a new password." },
  INVALID_PASSWORD: { path: "currentPassword", message: "This is not your present password." },
  USER_ALREADY_EXISTS_USE_ANOTHER_EMAIL: { path: "email", message: "This address has an account. Sign in instead." },
  USER_ALREADY_EXISTS: { path: "email", message: "This address has an account. Sign in instead." },
  INVALID_TOKEN: { path: "", message: "This link is used or too old. Ask for a new one." },
  PASSWORD_TOO_SHORT: { path: "password", message: "The password is too short." },
  PASSWORD_TOO_LONG: { path: "password", message: "The password is too long." },
};

/** better-auth's refusals as AppErrors; anything else comes back as it is, to be thrown on. */
export function appErrorOf(error: unknown): unknown {
  if (!isAPIError(error)) return error;
  const body = bodySchema.safeParse(error.body);
  const { code = "", message = "" } = body.success ? body.data : {};
  if (error.statusCode === 429) return new AppError("too-many-requests", message || "Too many attempts. Wait a minute, then try again.", { cause: error });
  const known = sentences[code];
  if (!known && error.statusCode === 401) return new AppError("unauthenticated", "Sign in first.", { cause: error });
  if (!known) return error;
  const fields: FieldError[] = known.path === "" ? [] : [known];
  return new AppError("invalid", known.message, { fields, cause: error });
}
