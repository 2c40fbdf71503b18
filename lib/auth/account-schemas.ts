import { z } from "zod";

export const passwordMinLength = 10;
export const passwordMaxLength = 128;

export const emailField = z.email("Enter an e-mail address such as name@example.org.").max(254, "An e-mail address has at most 254 characters.").toLowerCase();
export const nameField = z.string().trim().min(1, "Enter your name.").max(80, "A name has at most 80 characters.");
export const teamNameField = z.string().trim().min(1, "Name the team.").max(80, "A team's name has at most 80 characters.");
export const newPasswordField = z
  .string()
  .min(passwordMinLength, `A password has at least ${passwordMinLength} characters.`)
  .max(passwordMaxLength, `A password has at most ${passwordMaxLength} characters.`);
const presentPasswordField = z.string().min(1, "Enter your password.").max(passwordMaxLength, `A password has at most ${passwordMaxLength} characters.`);

export const signInSchema = z.strictObject({ email: emailField, password: presentPasswordField });

/** `invitationId` takes the place of `teamName`: an invited person joins a team and makes none. */
export const registerSchema = z
  .strictObject({
    name: nameField,
    email: emailField,
    password: newPasswordField,
    teamName: teamNameField.optional(),
    invitationId: z.string().min(1).max(100).optional(),
  })
  .refine((input) => input.invitationId !== undefined || input.teamName !== undefined, { path: ["teamName"], message: "Name the team." });

export const forgotPasswordSchema = z.strictObject({ email: emailField });
export const resetPasswordSchema = z.strictObject({ token: z.string().min(1).max(200), password: newPasswordField });
export const changePasswordSchema = z.strictObject({ currentPassword: presentPasswordField, newPassword: newPasswordField });
export const changeNameSchema = z.strictObject({ name: nameField });
