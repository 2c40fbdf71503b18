import { chmodSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { checkCluster, writeClusterRecord } from "@/scripts/lib/cluster-folder.mjs";
import { checkDataFolder, prepareDataFolder, readPurpose, recordPurpose } from "@/scripts/lib/data-folder.mjs";
import { requireFreeSpace } from "@/scripts/lib/files.mjs";
import { describeError, PlainError } from "@/scripts/lib/plain-error.mjs";
import { ensureSecrets } from "@/scripts/lib/secrets.mjs";

let home = "";
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), "saddlemark-unit-"));
});
afterEach(() => {
  rmSync(home, { recursive: true, force: true });
});

describe("a data folder", () => {
  test("is made where there is none, and recognised afterwards", () => {
    const folder = join(home, "new", "data");
    expect(prepareDataFolder(folder).root).toBe(folder);
    expect(prepareDataFolder(folder).root).toBe(folder);
    expect(readdirSync(folder).sort()).toEqual(["logs", "outbox", "saddlemark.json"]);
  });

  test.each([
    { what: "somebody's files", file: "thesis.tex", content: "x", line: "is not empty and Saddlemark did not make it" },
    { what: "somebody's PostgreSQL cluster", file: "PG_VERSION", content: "15\n", line: "is a PostgreSQL cluster that Saddlemark did not make" },
    { what: "a newer Saddlemark's data", file: "saddlemark.json", content: '{"format":2}', line: "was made by a newer Saddlemark" },
    { what: "a damaged marker", file: "saddlemark.json", content: '{"form', line: "is damaged" },
  ])("with $what is refused and left as it was", ({ file, content, line }) => {
    writeFileSync(join(home, file), content);
    expect(() => prepareDataFolder(home)).toThrow(line);
    expect(readdirSync(home)).toEqual([file]);
    expect(readFileSync(join(home, file), "utf8")).toBe(content);
  });

  test("is taken over from a start that was killed while it wrote the marker", () => {
    writeFileSync(join(home, "saddlemark.json.new"), "{");
    expect(prepareDataFolder(home).root).toBe(home);
  });

  test("that is a file is refused", () => {
    writeFileSync(join(home, "data"), "");
    expect(() => checkDataFolder(join(home, "data"))).toThrow("is not a folder");
  });

  test("remembers what it was first used for", () => {
    const paths = prepareDataFolder(join(home, "data"));
    expect(readPurpose(paths)).toBe(null);
    recordPurpose(paths, "real");
    recordPurpose(paths, "demonstration");
    expect(readPurpose(paths)).toBe("real");
  });
});

describe("secrets", () => {
  test("are random, kept, and readable by their owner only", () => {
    const first = prepareDataFolder(join(home, "first"));
    const made = ensureSecrets(first);
    chmodSync(first.secrets, 0o644);
    expect(ensureSecrets(first)).toEqual(made);
    expect(statSync(first.secrets).mode & 0o777).toBe(0o600);
    const other = ensureSecrets(prepareDataFolder(join(home, "other")));
    expect(new Set([...Object.values(made), ...Object.values(other)]).size).toBe(10);
  });

  test("are never replaced once a database needs them", () => {
    const paths = prepareDataFolder(join(home, "data"));
    writeClusterRecord(paths, { folder: paths.postgres, port: 5555, made: true });
    expect(() => ensureSecrets(paths)).toThrow("is gone");
    expect(readdirSync(paths.root)).not.toContain("secrets.json");
  });
});

describe("a cluster", () => {
  test.each([
    { what: "nobody's record", record: false, made: false, version: "15", line: "was not made by Saddlemark" },
    { what: "no PG_VERSION", record: true, made: true, version: null, line: "PG_VERSION is missing" },
    { what: "a PG_VERSION of 9.6", record: true, made: true, version: "9.6", line: 'PG_VERSION is "9.6"' },
  ])("with $what is refused", ({ record, made, version, line }) => {
    const paths = prepareDataFolder(join(home, "data"));
    if (record) writeClusterRecord(paths, { folder: paths.postgres, port: 5555, made });
    mkdirSync(paths.postgres);
    if (version !== null) writeFileSync(join(paths.postgres, "PG_VERSION"), `${version}\n`);
    expect(() => checkCluster(paths)).toThrow(line);
  });

  test("that has gone is not silently made anew", () => {
    const paths = prepareDataFolder(join(home, "data"));
    writeClusterRecord(paths, { folder: paths.postgres, port: 5555, made: true });
    expect(() => checkCluster(paths)).toThrow("is gone");
  });

  test("of ours tells its major version, finished or just before the record of it", () => {
    const paths = prepareDataFolder(join(home, "data"));
    writeClusterRecord(paths, { folder: paths.postgres, port: 5555, made: false });
    expect(checkCluster(paths)).toBe(null);
    mkdirSync(paths.postgres);
    writeFileSync(join(paths.postgres, "PG_VERSION"), "15\n");
    expect(checkCluster(paths)).toBe(15);
  });
});

describe("one line for", () => {
  test.each([
    ["EROFS", "Cannot use /srv/x: the disk is read-only."],
    ["ENOSPC", "Cannot use /srv/x: the disk is full."],
    ["EACCES", "Cannot use /srv/x: permission is denied."],
  ])("%s", (code, line) => {
    expect(describeError(Object.assign(new Error(`${code}: whatever`), { code, path: "/srv/x" }))).toBe(line);
  });

  test("an unexpected failure of many lines", () => {
    expect(describeError(new Error("first\n  second"))).toBe("Unexpected failure: first second");
  });

  test("a disk with less space than needed", () => {
    expect(() => requireFreeSpace(home, Number.MAX_SAFE_INTEGER)).toThrow(PlainError);
    expect(() => requireFreeSpace(home, Number.MAX_SAFE_INTEGER)).toThrow(/^The disk of .* is full: \d+ MiB free, \d+ MiB needed\./);
    expect(() => requireFreeSpace(home, 1)).not.toThrow();
  });
});
