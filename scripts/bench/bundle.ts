/*
 * JavaScript that /cases/[number] loads in a browser, gzipped: at most 220 kB.
 *
 * With BENCH_BASE_URL and BENCH_DATA_DIR (folder of demo-accounts.json) a running server is measured; without them this starts one of its
 * own in a folder that is removed at the end. Exit code 1 when the figure does not hold.
 */
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { chromium } from "@playwright/test";
import { z } from "zod";
import { runApplication } from "../lib/application.mjs";

const limitKilobytes = 220;
const accountSchema = z.array(z.object({ email: z.string(), password: z.string(), role: z.string() }));

void main().catch((error: unknown) => {
  console.error(`bundle: ${error instanceof Error ? error.message : String(error)}`);
  process.exitCode = 1;
});

async function main(): Promise<void> {
  const server = await target();
  try {
    const kilobytes = await scriptKilobytes(server.baseUrl, server.accountsFile);
    console.log(`JavaScript of /cases/[number], gzipped: ${kilobytes.toFixed(1)} kB (at most ${limitKilobytes} kB)`);
    if (kilobytes > limitKilobytes) process.exitCode = 1;
  } finally {
    await server.stop();
  }
}

type Target = { baseUrl: string; accountsFile: string; stop: () => Promise<void> };

async function target(): Promise<Target> {
  const { BENCH_BASE_URL: baseUrl, BENCH_DATA_DIR: dataFolder } = process.env;
  if (baseUrl && dataFolder) return { baseUrl, accountsFile: join(dataFolder, "demo-accounts.json"), stop: async () => undefined };
  const folder = mkdtempSync(join(tmpdir(), "saddlemark-bundle-"));
  const application = await runApplication({ dataFolder: join(folder, "data"), logFile: join(folder, "start.log"), signal: new AbortController().signal });
  const stop = async () => {
    await application.stop();
    rmSync(folder, { recursive: true, force: true });
  };
  return { baseUrl: application.baseUrl, accountsFile: application.paths.demoAccounts, stop };
}

/** Everything of type script that the page fetches until it is at rest, as gzip makes it. */
async function scriptKilobytes(baseUrl: string, accountsFile: string): Promise<number> {
  const [account] = accountSchema.parse(JSON.parse(readFileSync(accountsFile, "utf8")));
  if (!account) throw new Error("There are no demonstration accounts.");
  const browser = await chromium.launch({ executablePath: "/usr/bin/chromium", args: ["--no-sandbox", "--disable-gpu", "--disable-background-networking", "--no-first-run"] });
  try {
    const context = await browser.newContext();
    const signIn = await context.request.post(`${baseUrl}/api/auth/sign-in/email`, { headers: { origin: baseUrl }, data: { email: account.email, password: account.password } });
    if (!signIn.ok()) throw new Error(`Signing in was answered with ${signIn.status()}.`);
    const page = await context.newPage();
    const bodies: Promise<number>[] = [];
    page.on("response", (response) => {
      if (response.request().resourceType() === "script") bodies.push(response.body().then((body) => gzipSync(body).length));
    });
    await page.goto(`${baseUrl}/cases/8`, { waitUntil: "networkidle" });
    const sizes = await Promise.all(bodies);
    return sizes.reduce((all, size) => all + size, 0) / 1000;
  } finally {
    await browser.close();
  }
}
