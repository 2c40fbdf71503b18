import { createAccessControl } from "better-auth/plugins/access";
import { mayRole, type Role } from "./permissions";

/** What better-auth's organisations know to ask for. */
const statements = {
  organization: ["update", "delete"],
  member: ["create", "update", "delete"],
  invitation: ["create", "cancel"],
} as const;

export const teamAccess = createAccessControl(statements);

const manager = teamAccess.newRole({ organization: ["update"], member: ["create", "update", "delete"], invitation: ["create", "cancel"] });
const reader = teamAccess.newRole({ organization: [], member: [], invitation: [] });

/** better-auth's roles, derived from the one permission table. */
export const teamRoles: Record<Role, typeof manager | typeof reader> = {
  owner: accessOf("owner"),
  curator: accessOf("curator"),
  analyst: accessOf("analyst"),
  observer: accessOf("observer"),
};

function accessOf(role: Role): typeof manager | typeof reader {
  return mayRole(role, "team:manage") ? manager : reader;
}
