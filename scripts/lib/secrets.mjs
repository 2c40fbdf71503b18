import { randomBytes } from "node:crypto";
import { chmodSync, existsSync } from "node:fs";
import { readJsonObject, writeFileDurably } from "./files.mjs";
import { PlainError } from "./plain-error.mjs";

const names = /** @type {const} */ (["ownerPassword", "appPassword", "authPassword", "betterAuthSecret", "runToken"]);

/** @typedef {Record<typeof names[number], string>} Secrets */

/**
 * The data folder's secrets, made at random the first time; readable by the owner of the file only.
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @returns {Secrets}
 */
export function ensureSecrets({ secrets: path, cluster }) {
  if (readJsonObject(path) === null) {
    if (existsSync(cluster)) throw new PlainError(`${path} is gone, and without it nobody can open the database; restore it from a backup.`);
    const fresh = Object.fromEntries(names.map((name) => [name, randomBytes(32).toString("base64url")]));
    writeFileDurably(path, `${JSON.stringify(fresh, null, 2)}\n`, 0o600);
  }
  chmodSync(path, 0o600);
  return readSecrets(path);
}

/**
 * @param {string} path
 * @returns {Secrets}
 */
export function readSecrets(path) {
  const found = readJsonObject(path) ?? {};
  const secret = (/** @type {typeof names[number]} */ name) => {
    const value = found[name];
    if (typeof value === "string" && value.length >= 32) return value;
    throw new PlainError(`${path} is damaged: ${name} is missing. Restore the file from a backup.`);
  };
  return {
    ownerPassword: secret("ownerPassword"),
    appPassword: secret("appPassword"),
    authPassword: secret("authPassword"),
    betterAuthSecret: secret("betterAuthSecret"),
    runToken: secret("runToken"),
  };
}
