/**
 * The part of better-auth that answers over HTTP. Membership and keys are changed by use-cases only, which check the
 * permission table and write the audit row in the same transaction.
 */
export const openAuthPaths = [
  "/sign-in/email",
  "/sign-up/email",
  "/sign-out",
  "/get-session",
  "/request-password-reset",
  "/reset-password",
  "/change-password",
  "/revoke-other-sessions",
  "/organization/list",
  "/organization/set-active",
  "/ok",
] as const;

/** True for a request that better-auth may answer; `pathname` with its prefix "/api/auth". */
export function isOpenAuthPath(pathname: string): boolean {
  const paths: readonly string[] = openAuthPaths;
  return pathname.startsWith("/api/auth/") && paths.includes(pathname.slice("/api/auth".length));
}
