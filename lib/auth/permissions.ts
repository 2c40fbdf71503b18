/** The four roles of a team, from the most to the least able. */
export const roles = ["owner", "curator", "analyst", "observer"] as const;
export type Role = (typeof roles)[number];

const everyone: readonly Role[] = roles;
const writers: readonly Role[] = ["owner", "curator", "analyst"];
const curators: readonly Role[] = ["owner", "curator"];
const owners: readonly Role[] = ["owner"];

/** The one table of who may do what. A role that is not listed has no right. */
export const permissionTable = {
  "team:read": everyone,
  "team:manage": owners,
  "keys:manage": owners,
  "machines:read": everyone,
  "machines:manage": owners,
  "machines:add": writers,
  "cases:read": everyone,
  "cases:write": writers,
  "cases:delete": owners,
  "runs:read": everyone,
  "runs:write": writers,
  "hit-rates:read": everyone,
  "rulebook:read": everyone,
  "rulebook:edit": curators,
  "audit:read": everyone,
  "export:read": everyone,
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof permissionTable;

/** Permissions that only read; all others are refused to a key with scope "read". */
export function isReadPermission(permission: Permission): boolean {
  return permission.endsWith(":read");
}

export function mayRole(role: string, permission: Permission): boolean {
  const allowed: readonly string[] = permissionTable[permission];
  return allowed.includes(role);
}
