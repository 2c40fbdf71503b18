import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";

/**
 * A hash of files and whole folders, by path and content; absent ones count as absent.
 * @param {string} root
 * @param {readonly string[]} names relative to root
 * @returns {string}
 */
export function hashSources(root, names) {
  const hash = createHash("sha256");
  for (const name of [...names].sort()) addTo(hash, root, name);
  return hash.digest("hex");
}

/**
 * @param {import("node:crypto").Hash} hash
 * @param {string} root
 * @param {string} name
 */
function addTo(hash, root, name) {
  const path = join(root, name);
  if (!existsSync(path)) return;
  if (statSync(path).isDirectory()) {
    for (const inner of readdirSync(path).sort()) addTo(hash, root, `${name}/${inner}`);
    return;
  }
  const content = readFileSync(path);
  hash.update(`${name}\0${content.length}\0`).update(content);
}
