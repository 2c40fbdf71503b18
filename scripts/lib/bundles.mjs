import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from "node:fs";
import { basename, join } from "node:path";
import { PlainError } from "./plain-error.mjs";
import { hashSources } from "./source-hash.mjs";

const programs = {
  migrate: "db/migrate.ts",
  seed: "db/seed/main.ts",
  worker: "lib/jobs/worker.ts",
  "fake-smtp": "lib/email/fake-smtp.ts",
};
const sources = ["db", "lib", "rules", "drizzle", "tsconfig.json", "package-lock.json", "scripts/lib/bundles.mjs"];

/**
 * Bundles the programs beside the web server into dist/, unless they are there for these sources already.
 * A file lib/**\/*.thread.ts becomes dist/<name>.mjs, for `new Worker(new URL("./<name>.mjs", import.meta.url))`.
 * @param {string} root
 */
export async function ensureBundles(root) {
  const stamp = join(root, "dist", "programs.stamp");
  const wanted = hashSources(root, sources);
  if (existsSync(stamp) && readFileSync(stamp, "utf8") === wanted) return;
  rmSync(stamp, { force: true });
  for (const [name, file] of Object.entries(programs)) {
    if (!existsSync(join(root, file))) throw new PlainError(`The checkout is incomplete: ${file} (${name}) is missing.`);
  }
  const threads = findThreads(join(root, "lib")).map((file) => [basename(file, ".thread.ts"), file]);
  await bundle({ root, entries: { ...programs, ...Object.fromEntries(threads) }, folder: "dist" });
  writeFileSync(stamp, wanted);
}

/**
 * @param {{ root: string, entries: Record<string, string>, folder: string }} options entries: name -> source file
 */
export async function bundle({ root, entries, folder }) {
  mkdirSync(join(root, folder), { recursive: true });
  const { build } = await import("esbuild"); // only there once npm ci has run
  try {
    await build({
      absWorkingDir: root,
      entryPoints: Object.entries(entries).map(([out, source]) => ({ in: source, out })),
      outdir: folder,
      outExtension: { ".js": ".mjs" },
      bundle: true,
      packages: "external",
      platform: "node",
      target: "node20",
      format: "esm",
      sourcemap: "linked",
      tsconfig: join(root, "tsconfig.json"),
      logLevel: "silent",
      // Next resolves this marker by itself; outside Next it has no meaning.
      plugins: [{ name: "server-only", setup: emptyServerOnly }],
    });
  } catch (error) {
    throw new PlainError(`Bundling failed: ${describeFailure(error)}`);
  }
}

/** @param {import("esbuild").PluginBuild} build */
function emptyServerOnly(build) {
  build.onResolve({ filter: /^server-only$/ }, ({ path }) => ({ path, namespace: "empty" }));
  build.onLoad({ filter: /.*/, namespace: "empty" }, () => ({ contents: "" }));
}

/** @param {unknown} error */
function describeFailure(error) {
  const first = error instanceof Error && "errors" in error && Array.isArray(error.errors) ? error.errors[0] : undefined;
  if (first === undefined) return error instanceof Error ? error.message : String(error);
  return first.location ? `${first.location.file}:${first.location.line}: ${first.text}` : first.text;
}

/**
 * @param {string} folder
 * @returns {string[]}
 */
function findThreads(folder) {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) return findThreads(path);
    return name.endsWith(".thread.ts") ? [path] : [];
  });
}
