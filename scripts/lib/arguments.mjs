import { resolve } from "node:path";
import { parseArgs } from "node:util";
import { PlainError } from "./plain-error.mjs";

export const startUsage = `Usage: npm start [-- options]

  --port N     serve on 127.0.0.1:N (default 3000)
  --data DIR   keep the database, secrets and logs in DIR (default .data)
  --no-demo    a real installation: no demonstration data; the first person to register owns the first team
  --dev        the development server instead of the built one
  --help       this text

DATABASE_URL set: use that PostgreSQL server (as an account that may create roles) and start none.
SMTP_URL set: send mail there; otherwise mail is kept in DIR/outbox.
`;

export const testParts = /** @type {const} */ (["unit", "database", "browser"]);

/**
 * @param {string[]} words
 * @param {string} folder what a relative --data refers to
 * @returns {{ help: boolean, port: number, dataFolder: string, demonstration: boolean, development: boolean }}
 */
export function parseStartArguments(words, folder) {
  const values = parse(words, {
    port: { type: "string" },
    data: { type: "string" },
    "no-demo": { type: "boolean" },
    dev: { type: "boolean" },
    help: { type: "boolean", short: "h" },
  }).values;
  return {
    help: values.help === true,
    port: parsePort(values.port ?? "3000"),
    dataFolder: dataFolderFrom(values.data, folder),
    demonstration: values["no-demo"] !== true,
    development: values.dev === true,
  };
}

/**
 * @param {string[]} words
 * @returns {{ parts: readonly ("unit" | "database" | "browser")[] }}
 */
export function parseTestArguments(words) {
  const { only } = parse(words, { only: { type: "string" } }).values;
  if (only === undefined) return { parts: testParts };
  const parts = testParts.filter((part) => part === only);
  if (parts.length === 0) throw new PlainError(`--only takes ${testParts.join(", ")}; "${only}" is none of them.`);
  return { parts };
}

/**
 * @param {string[]} words
 * @param {string} folder
 * @returns {{ file: string, dataFolder: string }}
 */
export function parseBackupArguments(words, folder) {
  const { values, positionals } = parse(words, { data: { type: "string" } }, true);
  const [file, ...more] = positionals;
  if (file === undefined || file === "" || more.length > 0) {
    throw new PlainError("Name one file to write: npm run backup -- FILE [--data DIR].");
  }
  return { file: resolve(folder, file), dataFolder: dataFolderFrom(values.data, folder) };
}

/**
 * @param {string[]} words
 * @param {string} folder
 * @returns {{ verb: "up" | "down", dataFolder: string }}
 */
export function parseClusterArguments(words, folder) {
  const { values, positionals } = parse(words, { data: { type: "string" } }, true);
  const [verb, ...more] = positionals;
  if ((verb !== "up" && verb !== "down") || more.length > 0) {
    throw new PlainError("Use: node scripts/cluster.mjs up|down [--data DIR].");
  }
  return { verb, dataFolder: dataFolderFrom(values.data, folder) };
}

/**
 * Which bench files to run: every --name asked for, or all.
 * @param {string[]} words
 * @param {string[]} names the bench files that exist
 * @returns {string[]}
 */
export function parseBenchArguments(words, names) {
  const asked = words.map((word) => word.replace(/^--/, ""));
  for (const [index, name] of asked.entries()) {
    if (!words[index]?.startsWith("--") || !names.includes(name)) {
      throw new PlainError(`There is no bench "${words[index]}"; there are ${names.map((known) => `--${known}`).join(", ") || "none yet"}.`);
    }
  }
  return asked.length === 0 ? names : names.filter((name) => asked.includes(name));
}

/** @param {string} text */
function parsePort(text) {
  const port = /^\d{1,5}$/.test(text) ? Number(text) : 0;
  if (port < 1 || port > 65535) throw new PlainError(`--port takes a whole number from 1 to 65535; "${text}" is not one.`);
  return port;
}

/**
 * @param {string | undefined} text
 * @param {string} folder
 */
function dataFolderFrom(text, folder) {
  if (text === "") throw new PlainError("--data takes the path of a folder; it is empty.");
  return resolve(folder, text ?? ".data");
}

/**
 * @template {NonNullable<import("node:util").ParseArgsConfig["options"]>} T
 * @param {string[]} words
 * @param {T} options
 * @param {boolean} allowPositionals
 */
function parse(words, options, allowPositionals = false) {
  try {
    return parseArgs({ args: words, options, allowPositionals, strict: true });
  } catch (error) {
    const reason = error instanceof Error ? error.message.split(". ")[0] : String(error);
    throw new PlainError(`${reason}. See npm start -- --help.`);
  }
}
