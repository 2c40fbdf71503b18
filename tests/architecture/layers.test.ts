import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { sourceFiles, topLevelNames, type SourceFile } from "./source-files";

/** The pure stages in the order of the data flow; each may import those to its left. */
const stages = ["shared", "questionnaire", "sizes", "strategies", "estimates", "advice", "runs", "hit-rates", "refinement"];

const files = ["app", "components", "lib", "rules", "db"].flatMap(sourceFiles);
const lockFile = fileURLToPath(new URL("../../package-lock.json", import.meta.url));
const ours = /^(app|components|lib|rules|db|tests|scripts)\//;

function offenders(select: (path: string) => boolean, refuse: (target: string, file: SourceFile) => boolean): string[] {
  return files
    .filter((file) => select(file.path))
    .flatMap((file) => file.imports.filter((target) => refuse(target, file)).map((target) => `${file.path} -> ${target}`));
}

const under = (...folders: string[]) => (path: string) => folders.some((folder) => path.startsWith(`${folder}/`));

describe("imports", () => {
  it("lib/shared imports nothing of ours", () => {
    expect(offenders(under("lib/shared"), (target) => ours.test(target) && !target.startsWith("lib/shared/"))).toEqual([]);
  });

  it.each(stages.slice(1))("the stage %s imports leftwards only", (stage) => {
    const index = stages.indexOf(stage);
    const allowed = [...stages.slice(0, index + 1).map((name) => `lib/${name}/`), "lib/numerics/"];
    if (index >= stages.indexOf("advice")) allowed.push("rules/");
    expect(offenders(under(`lib/${stage}`), (target) => ours.test(target) && !allowed.some((prefix) => target.startsWith(prefix)))).toEqual([]);
  });

  it("numerics imports nothing outside itself", () => {
    expect(offenders(under("lib/numerics"), (target) => !target.startsWith("lib/numerics/"))).toEqual([]);
  });

  it("rules import zod, json-rules-engine and lib/shared only", () => {
    const allowed = (target: string) => target === "zod" || target === "json-rules-engine" || target.startsWith("rules/") || target.startsWith("lib/shared/");
    expect(offenders(under("rules"), (target) => !allowed(target))).toEqual([]);
  });

  it("routes never reach the database, the rules or the numerics themselves", () => {
    expect(offenders(under("app"), (target) => under("db", "rules", "lib/numerics")(target))).toEqual([]);
  });

  it("components know no database, no use-case, no auth server and no engine", () => {
    const refused = under("db", "lib/use-cases", "lib/jobs", "lib/email", "lib/numerics", "app");
    // Pure parts of lib/auth: what a form says and what came of it.
    const server = (target: string) => /^lib\/auth\/(?!permissions$|form-answer$|[a-z]+-schemas$)/.test(target);
    expect(offenders(under("components"), (target) => refused(target) || server(target) || target === "json-rules-engine")).toEqual([]);
  });

  it("client files stay away from the database, use-cases and the auth server", () => {
    const client = new Set(files.filter((file) => /^["']use client["']/.test(file.text)).map((file) => file.path));
    const refused = (target: string) => under("db", "lib/use-cases", "lib/jobs")(target) || target === "lib/auth/auth" || target === "pg";
    expect(offenders((path) => client.has(path), refused)).toEqual([]);
  });

  it("the database layer knows no screen", () => {
    expect(offenders(under("db"), (target) => under("app", "components")(target) || target === "next" || target.startsWith("next/"))).toEqual([]);
  });

  it("mail and pages are never sent from a use-case, only queued", () => {
    expect(offenders(under("lib/use-cases"), (target) => target === "react" || target.startsWith("next") || target === "lib/email/transport")).toEqual([]);
  });

  it("SQL stands in the database layer only", () => {
    const allowed = (path: string) => under("db", "lib/jobs", "lib/auth")(path);
    expect(offenders((path) => !allowed(path), (target) => target === "pg" || target.startsWith("drizzle-orm"))).toEqual([]);
  });
});

describe("the house", () => {
  const allowed = new Set([
    "app", "components", "lib", "rules", "db", "drizzle", "tests", "scripts", "public", "README.md", "DEVELOPERS.md", "package.json",
    "package-lock.json", "tsconfig.json", "next.config.mjs", "tailwind.config.ts", "drizzle.config.ts", "components.json", "proxy.ts",
    "eslint.config.mjs", "postcss.config.mjs", "vitest.config.ts", "playwright.config.ts",
  ]);
  const madeByTools = new Set(["node_modules", "dist", "next-env.d.ts", "tsconfig.tsbuildinfo", "test-results", "coverage", "playwright-report"]);

  it("has nothing at its top level that is not named in the guide", () => {
    expect(topLevelNames().filter((name) => !name.startsWith(".") && !allowed.has(name) && !madeByTools.has(name))).toEqual([]);
  });

  it("keeps every source file under 400 lines", () => {
    expect(files.filter((file) => file.text.split("\n").length > 400).map((file) => file.path)).toEqual([]);
  });

  it("writes no raw colour in a component", () => {
    // app/layout.tsx names the two paper colours for the browser's own frame, which reads no variables.
    const components = files.filter((file) => /^(components|app)\//.test(file.path) && file.path !== "app/layout.tsx");
    expect(components.filter((file) => /["'`[]#[0-9a-f]{6}\b/i.test(file.text)).map((file) => file.path)).toEqual([]);
  });

  it("names no download address in the lock file", () => {
    expect(readFileSync(lockFile, "utf8")).not.toContain('"resolved"');
  });
});
