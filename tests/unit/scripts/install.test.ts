import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { explainAptFailure } from "@/scripts/lib/debian-packages.mjs";
import { checkNodeVersion } from "@/scripts/lib/node-version.mjs";
import { explainNpmFailure, holdsLockedPackages } from "@/scripts/lib/npm-packages.mjs";
import { StepFailed } from "@/scripts/lib/processes.mjs";
import { hashSources } from "@/scripts/lib/source-hash.mjs";

let root = "";
beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), "saddlemark-unit-"));
});
afterEach(() => {
  rmSync(root, { recursive: true, force: true });
});

test.each([
  ["20.18.0", true],
  ["20.20.2", true],
  ["22.1.0", true],
  ["20.17.9", false],
  ["18.20.4", false],
])("Node %s is accepted: %s", (version, accepted) => {
  const check = () => checkNodeVersion(version);
  if (accepted) expect(check).not.toThrow();
  else expect(check).toThrow(`Node ${version} is too old; install Node 20.18 or newer.`);
});

// The wordings of npm 10 and apt 2.6, from memory.
test.each([
  ["npm error code ENOTFOUND", "cannot be reached"],
  ["npm error code EAI_AGAIN", "cannot be reached"],
  ["npm error code ECONNREFUSED", "cannot be reached"],
  ["npm error code ENOSPC", "is full"],
  ["npm error code EROFS", "read-only"],
  ["npm error code EUSAGE", "npm ci failed: as it was"],
])("npm's %s is explained", (output, line) => {
  expect(explainNpmFailure(new StepFailed("npm ci failed: as it was", output), "/log").message).toContain(line);
});

test.each([
  ["E: Could not get lock /var/lib/dpkg/lock-frontend. It is held by process 12", "another package installation is running"],
  ["Err:1 bookworm InRelease\n  Temporary failure resolving 'debian'", "cannot be reached"],
  ["E: Unable to locate package postgresql", "cannot be reached"],
  ["E: You don't have enough free space in /var/cache/apt/archives/.", "disk is full"],
  ["dpkg: error: failed to write: No space left on device", "disk is full"],
])("apt's %s is explained", (output, line) => {
  expect(explainAptFailure(new StepFailed("as it was", output), ["postgresql"], "/log").message).toContain(line);
});

describe("installed packages count as the locked ones", () => {
  const write = (path: string, packages: object) => writeFileSync(join(root, path), JSON.stringify({ packages }));
  test.each([
    { what: "when all versions agree", found: { "node_modules/a": { version: "1.0.0" } }, expected: true },
    { what: "not with another version", found: { "node_modules/a": { version: "1.0.1" } }, expected: false },
    { what: "not with one missing", found: { "node_modules/b": { version: "2.0.0" } }, expected: false },
    { what: "not with none", found: {}, expected: false },
  ])("$what", ({ found, expected }) => {
    mkdirSync(join(root, "node_modules"));
    write("package-lock.json", {
      "": { name: "x" },
      "node_modules/a": { version: "1.0.0" },
      "node_modules/for-another-machine": { version: "1.0.0", optional: true },
    });
    write("node_modules/.package-lock.json", found);
    expect(holdsLockedPackages(root)).toBe(expected);
  });

  test("not without node_modules", () => {
    write("package-lock.json", { "node_modules/a": { version: "1.0.0" } });
    expect(holdsLockedPackages(root)).toBe(false);
  });
});

test("the hash of sources changes with any content, name or file, and with nothing else", () => {
  mkdirSync(join(root, "lib", "deep"), { recursive: true });
  writeFileSync(join(root, "lib", "deep", "a.ts"), "1");
  const hash = () => hashSources(root, ["lib", "absent"]);
  const before = hash();
  writeFileSync(join(root, "other.ts"), "1");
  expect(hash()).toBe(before);
  writeFileSync(join(root, "lib", "deep", "a.ts"), "2");
  const changed = hash();
  writeFileSync(join(root, "lib", "b.ts"), "");
  const added = hash();
  expect(new Set([before, changed, added]).size).toBe(3);
});
