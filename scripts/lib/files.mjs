import { closeSync, existsSync, fsyncSync, mkdirSync, openSync, readFileSync, renameSync, rmSync, statfsSync, statSync, writeSync } from "node:fs";
import { dirname } from "node:path";
import { PlainError } from "./plain-error.mjs";

/**
 * Replaces a file whole or not at all, and only when it has reached the disk.
 * @param {string} path
 * @param {string} text
 * @param {number} mode
 */
export function writeFileDurably(path, text, mode = 0o644) {
  const fresh = `${path}.new`;
  rmSync(fresh, { force: true });
  const file = openSync(fresh, "wx", mode);
  try {
    writeSync(file, text);
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
  renameSync(fresh, path);
  syncFolder(dirname(path));
}

/**
 * Makes a folder and those above it, one by one: Node's recursive mkdir calls a read-only disk "no such file".
 * @param {string} path absolute
 * @param {number} mode
 */
export function makeFolder(path, mode) {
  if (existsSync(path)) return;
  makeFolder(dirname(path), mode);
  mkdirSync(path, { mode });
}

/** @param {string} path */
export function syncFolder(path) {
  const folder = openSync(path, "r");
  try {
    fsyncSync(folder);
  } finally {
    closeSync(folder);
  }
}

/**
 * The object in a JSON file, or null when there is no such file.
 * @param {string} path
 * @returns {Record<string, unknown> | null}
 */
export function readJsonObject(path) {
  if (!existsSync(path)) return null;
  let value;
  try {
    value = JSON.parse(readFileSync(path, "utf8"));
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
  }
  if (typeof value !== "object" || value === null || Array.isArray(value)) {
    throw new PlainError(`${path} is damaged: it holds no JSON object. Restore it from a backup.`);
  }
  return value;
}

/**
 * @param {string} folder
 * @param {number} neededBytes
 */
export function requireFreeSpace(folder, neededBytes) {
  const disk = statfsSync(folder);
  const freeBytes = disk.bavail * disk.bsize;
  if (freeBytes >= neededBytes) return;
  const mebibytes = (/** @type {number} */ bytes) => Math.floor(bytes / 2 ** 20);
  throw new PlainError(
    `The disk of ${folder} is full: ${mebibytes(freeBytes)} MiB free, ${mebibytes(neededBytes)} MiB needed. Free some space or choose another disk with --data.`,
  );
}

/**
 * Opens a log to append to; one that has grown past 8 MiB is put aside first.
 * @param {string} path
 * @returns {number} file descriptor
 */
export function openLog(path) {
  if (existsSync(path) && statSync(path).size > 8 * 2 ** 20) renameSync(path, `${path}.old`);
  return openSync(path, "a", 0o600);
}

/**
 * The line of a log that tells most, from `offset` bytes on.
 * @param {string} path
 * @param {number} offset
 */
export function tellingLine(path, offset = 0) {
  return pickTellingLine(existsSync(path) ? readFileSync(path).subarray(offset).toString("utf8") : "");
}

/**
 * @param {string} text
 * @returns {string} the last line that names a failure, else the last line, at most 300 characters
 */
export function pickTellingLine(text) {
  const lines = text.split("\n").map((line) => line.trim()).filter((line) => line !== "");
  const failures = lines.filter((line) => /\b(error|fatal|panic|failed|cannot|could not|no space left|read-only)\b/i.test(line));
  return (failures.at(-1) ?? lines.at(-1) ?? "no output").slice(0, 300);
}
