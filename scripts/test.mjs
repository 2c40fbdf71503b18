import { join } from "node:path";
import { parseTestArguments } from "./lib/arguments.mjs";
import { checkNodeVersion } from "./lib/node-version.mjs";
import { ensureNpmPackages } from "./lib/npm-packages.mjs";
import { describeError, PlainError, runMain } from "./lib/plain-error.mjs";
import { projectRoot } from "./lib/root.mjs";
import { listenForStop } from "./lib/stop-signals.mjs";
import { makeTestFolder } from "./lib/test-folder.mjs";
import { runBrowserPart, runDatabasePart, runUnitPart } from "./lib/test-parts.mjs";
import { failedPart, sumCounts } from "./lib/test-report.mjs";

const limitMinutes = 60;
const runners = { unit: runUnitPart, database: runDatabasePart, browser: runBrowserPart };

process.env.NEXT_TELEMETRY_DISABLED = "1";

await runMain(async () => {
  checkNodeVersion(process.versions.node);
  const { parts } = parseTestArguments(process.argv.slice(2));
  const stop = listenForStop();
  const timer = setTimeout(() => stop.abort(new PlainError(`The tests took longer than ${limitMinutes} minutes.`)), limitMinutes * 60_000);
  const { folder, discard } = await makeTestFolder();
  const counts = [];
  try {
    const say = (/** @type {string} */ line) => void process.stdout.write(`${line}\n`);
    await ensureNpmPackages({ root: projectRoot, logFile: join(folder, "npm.log"), signal: stop.signal, say });
    for (const part of parts) counts.push(await runPart(part, { folder, signal: stop.signal, abort: stop.abort, say }));
  } catch (error) {
    counts.push(failedPart(describeError(error)));
  } finally {
    clearTimeout(timer);
    await discard();
  }
  const { passed, failed, notes } = sumCounts(counts);
  for (const note of notes) process.stdout.write(`${note}\n`);
  process.stdout.write(`${passed} passed, ${failed} failed\n`);
  process.exitCode = failed > 0 || passed === 0 ? 1 : 0;
});
process.exit();

/**
 * A part that breaks off is one failure; the other parts still run.
 * @param {keyof typeof runners} part
 * @param {import("./lib/test-parts.mjs").TestRun} run
 */
async function runPart(part, run) {
  try {
    return await runners[part](run);
  } catch (error) {
    return failedPart(`The ${part} part broke off: ${describeError(error)}`);
  }
}
