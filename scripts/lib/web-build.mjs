import { existsSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { PlainError } from "./plain-error.mjs";
import { runStep, StepFailed } from "./processes.mjs";
import { hashSources } from "./source-hash.mjs";
import { takeLock } from "./lock.mjs";

const sources = [
  ...["app", "components", "db", "lib", "public", "rules", "proxy.ts", "instrumentation.ts", "next.config.mjs"],
  ...["postcss.config.mjs", "tailwind.config.ts", "package.json", "package-lock.json"],
];

/**
 * Builds the web application unless the build there is of these sources.
 * @param {{ root: string, logFile: string, env: NodeJS.ProcessEnv, signal?: AbortSignal, say: (line: string) => void }} options
 */
export async function ensureWebBuild({ root, logFile, env, signal, say }) {
  // Two starts on different data folders share one build.
  const release = await takeLock(join(root, "node_modules", ".saddlemark-build.lock"), { wait: true });
  try {
    const stamp = join(root, ".next", "saddlemark.stamp");
    const before = hashSources(root, sources);
    // next build may rewrite tsconfig.json, so that counts as it is afterwards.
    const wanted = () => `${before} ${hashSources(root, ["tsconfig.json"])}`;
    if (existsSync(stamp) && readFileSync(stamp, "utf8") === wanted()) return;
    say("Building the web application (one to three minutes)");
    rmSync(stamp, { force: true });
    await build({ root, logFile, env, signal });
    writeFileSync(stamp, wanted());
  } finally {
    release?.();
  }
}

/** @param {{ root: string, logFile: string, env: NodeJS.ProcessEnv, signal?: AbortSignal }} options */
async function build({ root, logFile, env, signal }) {
  try {
    await runStep({
      title: "Building the web application",
      command: process.execPath,
      args: [nextProgram(root), "build"],
      cwd: root,
      env: { ...env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" },
      logFile,
      signal,
    });
  } catch (error) {
    if (error instanceof StepFailed && /\bENOSPC\b|no space left/i.test(error.output)) {
      throw new PlainError("Building the web application failed: the disk of the project is full.");
    }
    throw error;
  }
}

/** @param {string} root */
export function nextProgram(root) {
  return join(root, "node_modules", "next", "dist", "bin", "next");
}
