import { parseStartArguments, startUsage } from "./lib/arguments.mjs";
import { checkNodeVersion } from "./lib/node-version.mjs";
import { runMain } from "./lib/plain-error.mjs";
import { startApplication } from "./lib/start-application.mjs";
import { listenForStop } from "./lib/stop-signals.mjs";

process.env.NEXT_TELEMETRY_DISABLED = "1";

await runMain(async () => {
  checkNodeVersion(process.versions.node);
  const options = parseStartArguments(process.argv.slice(2), process.cwd());
  if (options.help) {
    process.stdout.write(startUsage);
    return;
  }
  await startApplication(options, listenForStop(), (line) => {
    process.stdout.write(`${line}\n`);
  });
});
// Signal handlers and idle pipes must not keep a finished program alive.
process.exit();
