import { z } from "zod";
import { emailField } from "./account-schemas";
import { roles } from "./permissions";

const roleField = z.enum(roles, "Choose a role.");
const idField = z.string().min(1).max(100);

export const inviteSchema = z.strictObject({ email: emailField, role: roleField });
export const invitationIdSchema = z.strictObject({ invitationId: idField });
export const changeRoleSchema = z.strictObject({ userId: idField, role: roleField });
export const memberIdSchema = z.strictObject({ userId: idField });
export const createKeySchema = z.strictObject({
  name: z.string().trim().min(1, "Name the key after the script that will use it.").max(60, "A key's name has at most 60 characters."),
  scope: z.enum(["read", "write"], "Choose what the key may do."),
});
export const keyIdSchema = z.strictObject({ keyId: idField });
