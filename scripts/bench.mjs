import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readdirSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { parseBenchArguments } from "./lib/arguments.mjs";
import { bundle } from "./lib/bundles.mjs";
import { checkNodeVersion } from "./lib/node-version.mjs";
import { ensureNpmPackages } from "./lib/npm-packages.mjs";
import { PlainError, runMain } from "./lib/plain-error.mjs";
import { projectRoot } from "./lib/root.mjs";

process.env.NEXT_TELEMETRY_DISABLED = "1";

await runMain(async () => {
  checkNodeVersion(process.versions.node);
  const names = parseBenchArguments(process.argv.slice(2), benchNames());
  if (names.length === 0) throw new PlainError("There is nothing to measure: scripts/bench has no files.");
  const say = (/** @type {string} */ line) => void process.stdout.write(`${line}\n`);
  mkdirSync(join(projectRoot, "dist", "bench"), { recursive: true });
  await ensureNpmPackages({ root: projectRoot, logFile: join(tmpdir(), `saddlemark-npm-${process.pid}.log`), say });
  await bundle({ root: projectRoot, entries: Object.fromEntries(names.map((name) => [name, `scripts/bench/${name}.ts`])), folder: "dist/bench" });
  const missed = names.filter((name) => !runBench(name, say));
  if (missed.length > 0) throw new PlainError(`These figures do not hold: ${missed.join(", ")}.`);
});
process.exit();

function benchNames() {
  const folder = join(projectRoot, "scripts", "bench");
  if (!existsSync(folder)) return [];
  return readdirSync(folder).filter((name) => /^[a-z][a-z0-9-]*\.ts$/.test(name)).map((name) => name.replace(/\.ts$/, "")).sort();
}

/**
 * @param {string} name
 * @param {(line: string) => void} say
 * @returns {boolean} whether its figures hold
 */
function runBench(name, say) {
  say(`\n${name}`);
  const { status } = spawnSync(process.execPath, [`dist/bench/${name}.mjs`], {
    cwd: projectRoot,
    env: { ...process.env, NODE_ENV: "production" },
    stdio: "inherit",
  });
  return status === 0;
}
