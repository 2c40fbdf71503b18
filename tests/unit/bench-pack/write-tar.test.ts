import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { writeTar, type TarFile } from "@/lib/bench-pack/write-tar";

const folder = mkdtempSync(join(tmpdir(), "saddlemark-tar-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const modified = new Date("2026-12-01T08:00:00Z");

/** Unpacks with the system's tar, which is written by others: it is the check. Returns what it printed. */
function unpack(files: readonly TarFile[], name: string): { into: string; listing: string } {
  const archive = join(folder, `${name}.tar`);
  writeFileSync(archive, writeTar(files, modified));
  const listed = spawnSync("tar", ["--list", "--verbose", "--utc", "--file", archive], { encoding: "utf8" });
  expect(listed.stderr).toBe("");
  const into = mkdtempSync(join(folder, "out-"));
  const unpacked = spawnSync("tar", ["--extract", "--file", archive, "--directory", into], { encoding: "utf8" });
  expect({ status: unpacked.status, stderr: unpacked.stderr }).toEqual({ status: 0, stderr: "" });
  return { into, listing: listed.stdout };
}

describe("an archive", () => {
  it.each([
    ["of an empty file", [{ path: "empty", text: "" }]],
    ["of a file that fills its block", [{ path: "full", text: "x".repeat(512) }]],
    ["of files one byte around a block", [{ path: "less", text: "y".repeat(511) }, { path: "more", text: "z".repeat(513) }]],
    ["of text beyond ASCII", [{ path: "text", text: "Bᵀ W⁻¹ B, Küste\n" }]],
    ["of nested folders", [{ path: "a/b/c.txt", text: "deep" }, { path: "a/d.txt", text: "less deep" }]],
    ["of a path that needs both fields", [{ path: `${"long/".repeat(25)}${"n".repeat(90)}`, text: "far" }]],
  ])("%s is unpacked by tar to the same bytes", (name, files) => {
    const { into } = unpack(files, name.replace(/\W/g, "-"));
    for (const { path, text } of files) expect(readFileSync(join(into, path), "utf8")).toBe(text);
  });

  it("keeps the time, and who may execute", () => {
    const { into, listing } = unpack([{ path: "run.sh", text: "#!/bin/sh\n", executable: true }, { path: "plain", text: "" }], "modes");
    expect(listing).toMatch(/^-rwxr-xr-x .* 2026-12-01 08:00 run\.sh$/m);
    expect(listing).toMatch(/^-rw-r--r-- .* plain$/m);
    expect(statSync(join(into, "run.sh")).mtime).toEqual(modified);
  });

  it("is the same for the same files", () => {
    const files = [{ path: "a", text: "1" }];
    expect(writeTar(files, modified)).toEqual(writeTar(files, modified));
  });

  it.each(["/etc/passwd", "../up", "a/../../b", "with space", "", "n".repeat(101), `${"long/".repeat(60)}x`])("refuses the path %j", (path) => {
    expect(() => writeTar([{ path, text: "" }], modified)).toThrow();
  });
});
