import { z } from "zod";

const modes = ["demonstration", "production", "development", "test"] as const;
export type Mode = (typeof modes)[number];

const settingsSchema = z.object({
  SADDLEMARK_BASE_URL: z.url(),
  SADDLEMARK_MODE: z.enum(modes).default("production"),
  BETTER_AUTH_SECRET: z.string().min(32),
});

export type AuthSettings = { baseUrl: string; secret: string; secure: boolean; trustedOrigins: string[] };

/** Reads the settings of sign-in from the environment. Throws when one is missing or unusable. */
export function readAuthSettings(environment: NodeJS.ProcessEnv = process.env): AuthSettings {
  const settings = settingsSchema.parse(environment);
  const base = new URL(settings.SADDLEMARK_BASE_URL);
  const port = base.port === "" ? "" : `:${base.port}`;
  return {
    baseUrl: base.origin,
    secret: settings.BETTER_AUTH_SECRET,
    secure: base.protocol === "https:",
    // The same machine under its two usual names.
    trustedOrigins: [base.origin, `http://localhost${port}`, `http://127.0.0.1${port}`],
  };
}

/** What kind of installation this is; an unknown or missing value counts as production. */
export function readMode(environment: NodeJS.ProcessEnv = process.env): Mode {
  const parsed = z.enum(modes).safeParse(environment.SADDLEMARK_MODE);
  return parsed.success ? parsed.data : "production";
}
