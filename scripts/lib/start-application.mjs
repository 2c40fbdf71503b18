import { join } from "node:path";
import { ensureBundles } from "./bundles.mjs";
import { prepareDataFolder, readPurpose, recordPurpose } from "./data-folder.mjs";
import { startDatabase } from "./database.mjs";
import { ensureNpmPackages } from "./npm-packages.mjs";
import { PlainError } from "./plain-error.mjs";
import { findFreePort, requireFreePort } from "./ports.mjs";
import { runStep } from "./processes.mjs";
import { projectRoot } from "./root.mjs";
import { endOrphans, removeRunFile, takeDataFolder, writeRunFile } from "./run-file.mjs";
import { ensureSecrets } from "./secrets.mjs";
import { commonEnvironment, ownerEnvironment, serviceEnvironment } from "./service-environment.mjs";
import { checkDatabaseUrl, explainConnection, withClient } from "./sql.mjs";
import { untilStopped } from "./stop-signals.mjs";
import { createSupervisor } from "./supervisor.mjs";
import { waitForHealth, waitForPort } from "./waiting.mjs";
import { ensureWebBuild, nextProgram } from "./web-build.mjs";

/**
 * @typedef {ReturnType<typeof import("./arguments.mjs").parseStartArguments>} StartOptions
 * @typedef {ReturnType<typeof import("./stop-signals.mjs").listenForStop>} Stop
 * @typedef {object} Stage what the steps of one start share
 * @property {StartOptions} options
 * @property {import("./data-folder.mjs").DataPaths} paths
 * @property {import("./secrets.mjs").Secrets} secrets
 * @property {ReturnType<typeof createSupervisor>} supervisor
 * @property {AbortSignal} signal
 * @property {(line: string) => void} say
 */

/**
 * From whatever is there to a served application, and at the end everything stopped in order.
 * @param {StartOptions} options
 * @param {Stop} stop
 * @param {(line: string) => void} say
 */
export async function startApplication(options, stop, say) {
  const paths = prepareDataFolder(options.dataFolder);
  checkPurpose(paths, options);
  const release = await takeDataFolder(paths);
  const supervisor = createSupervisor(stop.abort);
  stop.onImpatience(supervisor.hurry);
  try {
    const stage = { options, paths, secrets: ensureSecrets(paths), supervisor, signal: stop.signal, say };
    await clearTheWay(stage);
    const ownerUrl = await prepareDatabase(stage);
    await prepareBuild(stage);
    await serve(stage, ownerUrl);
    await untilStopped(stop.signal);
  } finally {
    await end(options, paths, supervisor, say);
    release();
  }
}

/**
 * @param {StartOptions} options
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @param {ReturnType<typeof createSupervisor>} supervisor
 * @param {(line: string) => void} say
 */
async function end(options, paths, supervisor, say) {
  const services = supervisor.list();
  if (services.length > 0) say("Stopping");
  try {
    writeRunFile(paths.run, { address: addressOf(options), services, stopping: true });
  } finally {
    // On a full disk too, where the note above fails.
    await supervisor.stopAll();
    removeRunFile(paths.run);
  }
}

/**
 * @param {import("./data-folder.mjs").DataPaths} paths
 * @param {StartOptions} options
 */
function checkPurpose(paths, { demonstration }) {
  if (demonstration || readPurpose(paths) !== "demonstration") return;
  throw new PlainError(`${paths.root} holds the demonstration; choose another folder with --data for a real installation.`);
}

/** @param {Stage} stage */
async function clearTheWay({ options, paths, secrets, supervisor, signal, say }) {
  writeRunFile(paths.run, { address: addressOf(options), services: supervisor.list() });
  await endOrphans(secrets.runToken);
  await requireFreePort(options.port);
  // The run token lets the next start end an installation or a build that outlived a killed one.
  const env = { ...process.env, SADDLEMARK_RUN_TOKEN: secrets.runToken };
  await ensureNpmPackages({ root: projectRoot, logFile: join(paths.logs, "npm.log"), env, signal, say });
}

/**
 * @param {Stage} stage
 * @returns {Promise<string>} the owner's URL
 */
async function prepareDatabase(stage) {
  const { options, paths, secrets, signal, say } = stage;
  await ensureBundles(projectRoot);
  const ownerUrl = await connectOrStart(stage);
  const env = ownerEnvironment({ outer: process.env, ownerUrl, secrets, paths });
  const step = { command: process.execPath, cwd: projectRoot, env, signal };
  await runStep({ ...step, title: "The migration", args: ["dist/migrate.mjs"], logFile: join(paths.logs, "migrate.log") });
  const purpose = readPurpose(paths);
  const demonstration = purpose === null ? options.demonstration : purpose === "demonstration";
  recordPurpose(paths, demonstration ? "demonstration" : "real");
  if (demonstration) {
    if (purpose === null) say("Making the demonstration data");
    await runStep({ ...step, title: "Seeding the demonstration", args: ["dist/seed.mjs"], logFile: join(paths.logs, "seed.log") });
  }
  return ownerUrl;
}

/** @param {Stage} stage */
async function connectOrStart({ paths, secrets, supervisor, signal, say }) {
  const given = process.env.DATABASE_URL;
  if (given === undefined || given === "") {
    return (await startDatabase({ paths, secrets, startService: supervisor.start, signal, say })).ownerUrl;
  }
  checkDatabaseUrl(given);
  try {
    await withClient(given, async (client) => client.query("select 1"));
  } catch (error) {
    throw explainConnection(error, given);
  }
  return given;
}

/** @param {Stage} stage */
async function prepareBuild({ options, paths, secrets, signal, say }) {
  if (options.development) return;
  const env = commonEnvironment(process.env, secrets);
  await ensureWebBuild({ root: projectRoot, logFile: join(paths.logs, "build.log"), env, signal, say });
}

/**
 * @param {Stage} stage
 * @param {string} ownerUrl
 */
async function serve({ options, paths, secrets, supervisor, signal, say }, ownerUrl) {
  const { port, development } = options;
  const real = readPurpose(paths) === "real";
  const mode = development ? "development" : real ? "production" : "demonstration";
  const given = process.env.SMTP_URL;
  const smtpPort = given ? null : await findFreePort();
  const smtpUrl = smtpPort === null ? String(given) : `smtp://127.0.0.1:${smtpPort}`;
  const env = serviceEnvironment({ outer: process.env, ownerUrl, secrets, paths, mode, port, development, smtpUrl });
  const node = { command: process.execPath, cwd: projectRoot };
  if (smtpPort !== null) {
    supervisor.start({ ...node, name: "mail catcher", args: ["dist/fake-smtp.mjs"], env: { ...env, SMTP_PORT: String(smtpPort) }, logFile: join(paths.logs, "mail.log") });
    await waitForPort({ port: smtpPort, name: "mail catcher", signal });
  }
  supervisor.start({ ...node, name: "worker", args: ["dist/worker.mjs"], env, logFile: join(paths.logs, "worker.log"), graceMilliseconds: 20_000 });
  await requireFreePort(port);
  supervisor.start({
    ...node,
    name: "web server",
    args: [nextProgram(projectRoot), development ? "dev" : "start", "-H", "127.0.0.1", "-p", String(port)],
    env,
    logFile: development ? null : join(paths.logs, "web.log"),
  });
  writeRunFile(paths.run, { address: addressOf(options), services: supervisor.list() });
  await waitForHealth({ url: `${addressOf(options)}/api/health`, signal });
  say(`Saddlemark is ready at ${addressOf(options)}`);
  say(real ? "The first person to register becomes owner of the first team." : `Demonstration accounts: ${paths.demoAccounts}`);
  if (smtpPort !== null && real) say(`SMTP_URL is not set: mail is kept in ${paths.outbox} and not sent.`);
}

/** @param {StartOptions} options */
function addressOf({ port }) {
  return `http://127.0.0.1:${port}`;
}
