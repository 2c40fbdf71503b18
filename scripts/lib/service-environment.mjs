import { urlForRole } from "./sql.mjs";

/** What the programs must never inherit: the owner's access and an outer run's settings. */
const withheld = /^(DATABASE_URL.*|TEST_DATABASE_.*|PG[A-Z]+|NODE_ENV|PORT|SADDLEMARK_.*|npm_.*|VITEST.*)$/;

/**
 * @typedef {object} Setting
 * @property {NodeJS.ProcessEnv} outer the environment of the start
 * @property {string} ownerUrl
 * @property {import("./secrets.mjs").Secrets} secrets
 * @property {import("./data-folder.mjs").DataPaths} paths
 * @property {"demonstration" | "production" | "development" | "test"} mode
 * @property {number} port
 * @property {boolean} development
 * @property {string} smtpUrl
 */

/**
 * The environment of the web server and the worker: the two limited roles, never the owner.
 * @param {Setting} setting
 * @returns {NodeJS.ProcessEnv}
 */
export function serviceEnvironment({ outer, ownerUrl, secrets, paths, mode, port, development, smtpUrl }) {
  return {
    ...commonEnvironment(outer, secrets),
    NODE_ENV: development ? "development" : "production",
    DATABASE_URL_APP: urlForRole(ownerUrl, "saddlemark_app", secrets.appPassword),
    DATABASE_URL_AUTH: urlForRole(ownerUrl, "saddlemark_auth", secrets.authPassword),
    SADDLEMARK_BASE_URL: outer.SADDLEMARK_BASE_URL ?? `http://127.0.0.1:${port}`,
    SADDLEMARK_MODE: mode,
    SADDLEMARK_DATA_DIR: paths.root,
    BETTER_AUTH_SECRET: secrets.betterAuthSecret,
    BETTER_AUTH_TELEMETRY: "0",
    OUTBOX_DIR: paths.outbox,
    SMTP_URL: smtpUrl,
    MAIL_FROM: outer.MAIL_FROM ?? "Saddlemark <saddlemark@localhost>",
  };
}

/**
 * The environment of the migration and the seed, which work as the owner.
 * @param {{ outer: NodeJS.ProcessEnv, ownerUrl: string, secrets: import("./secrets.mjs").Secrets, paths: import("./data-folder.mjs").DataPaths }} setting
 * @returns {NodeJS.ProcessEnv}
 */
export function ownerEnvironment({ outer, ownerUrl, secrets, paths }) {
  return {
    ...commonEnvironment(outer, secrets),
    NODE_ENV: "production",
    DATABASE_URL: ownerUrl,
    DATABASE_URL_OWNER: ownerUrl,
    DATABASE_URL_APP: urlForRole(ownerUrl, "saddlemark_app", secrets.appPassword),
    DATABASE_URL_AUTH: urlForRole(ownerUrl, "saddlemark_auth", secrets.authPassword),
    APP_DATABASE_PASSWORD: secrets.appPassword,
    AUTH_DATABASE_PASSWORD: secrets.authPassword,
    BETTER_AUTH_SECRET: secrets.betterAuthSecret,
    DEMO_ACCOUNTS_FILE: paths.demoAccounts,
    SADDLEMARK_DATA_DIR: paths.root,
  };
}

/**
 * @param {NodeJS.ProcessEnv} outer
 * @param {import("./secrets.mjs").Secrets} secrets
 * @returns {NodeJS.ProcessEnv}
 */
export function commonEnvironment(outer, secrets) {
  const kept = Object.entries(outer).filter(([name]) => !withheld.test(name));
  return { ...Object.fromEntries(kept), NEXT_TELEMETRY_DISABLED: "1", SADDLEMARK_RUN_TOKEN: secrets.runToken };
}
