/*
 * POST /api/v1/advice over HTTP: p95 of 200 calls, one after the other, every one with other answers so that nothing can be remembered.
 *
 * With BENCH_BASE_URL, and BENCH_COOKIE or BENCH_KEY, a running server is measured. Without them this starts one of its own, as
 * `npm start` does, in a folder that is removed at the end, and signs in with a demonstration account.
 * Exit code 1 when the figure does not hold or no server answers.
 */
import { spawn, type ChildProcess } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { z } from "zod";
import { adviceSchema } from "@/lib/advice/advice";
import { meshFamilies } from "@/lib/questionnaire/answer-sets";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";

const limitMilliseconds = 60;
const calls = 200;
const warmUpCalls = 20;
const startMinutes = 12;

type Target = { baseUrl: string; headers: Record<string, string> };
type Server = { target: Target; stop: () => Promise<void> };

void main().catch((error: unknown) => {
  console.error(`http: ${error instanceof Error ? error.message : String(error)}`);
  process.exitCode = 1;
});

async function main(): Promise<void> {
  const server = givenServer() ?? (await startServer());
  try {
    report(await measure(server.target));
  } finally {
    await server.stop();
  }
}

async function measure(target: Target): Promise<number[]> {
  const milliseconds: number[] = [];
  for (let call = 0; call < warmUpCalls + calls; call += 1) {
    const elapsed = await timedCall(target, call);
    if (call >= warmUpCalls) milliseconds.push(elapsed);
  }
  return milliseconds.sort((a, b) => a - b);
}

/** From sending to the last byte of a right answer. */
async function timedCall({ baseUrl, headers }: Target, call: number): Promise<number> {
  const families = meshFamilies.filter((family) => family !== "imported");
  const questionnaire = {
    ...defaultQuestionnaire,
    meshFamily: families[call % families.length],
    degree: 1 + (call % 4),
    size: { by: "unknowns", value: 100_000 + 12_345 * call },
    contrast: { ratio: 10 ** (call % 7), pattern: "blocks" },
  };
  const started = performance.now();
  const response = await fetch(`${baseUrl}/api/v1/advice`, { method: "POST", headers: { ...headers, "content-type": "application/json" }, body: JSON.stringify(questionnaire) });
  const text = await response.text();
  const elapsed = performance.now() - started;
  if (response.status !== 200) throw new Error(`call ${call} answered ${response.status}: ${text.slice(0, 300)}`);
  adviceSchema.parse(JSON.parse(text));
  return elapsed;
}

function report(sorted: readonly number[]): void {
  const quantile = (share: number) => sorted[Math.ceil(share * sorted.length) - 1] ?? Number.NaN;
  const p95 = quantile(0.95);
  console.log(
    `http: POST /api/v1/advice p95 ${p95.toFixed(1)} ms, median ${quantile(0.5).toFixed(1)} ms over ${sorted.length} calls, ratio ${(p95 / limitMilliseconds).toFixed(2)} of the limit ${limitMilliseconds} ms`,
  );
  if (!(p95 < limitMilliseconds)) process.exitCode = 1;
}

function givenServer(): Server | null {
  const { BENCH_BASE_URL: baseUrl, BENCH_COOKIE: cookie, BENCH_KEY: key } = process.env;
  if (!baseUrl) return null;
  if (!cookie && !key) throw new Error("BENCH_BASE_URL needs BENCH_COOKIE or BENCH_KEY beside it.");
  const headers: Record<string, string> = key ? { authorization: `Bearer ${key}` } : { cookie: cookie ?? "" };
  return { target: { baseUrl, headers }, stop: async () => undefined };
}

async function startServer(): Promise<Server> {
  const port = await freePort();
  const folder = mkdtempSync(join(tmpdir(), "saddlemark-bench-"));
  const data = join(folder, "data");
  // Its own session, so that what it started can be ended with it whatever happens here.
  const child = spawn(process.execPath, ["scripts/start.mjs", "--port", String(port), "--data", data], { stdio: ["ignore", "ignore", "inherit"], detached: true });
  const stop = async () => {
    await ended(child);
    rmSync(folder, { recursive: true, force: true });
  };
  try {
    const baseUrl = `http://127.0.0.1:${port}`;
    await answering(baseUrl, child);
    return { target: { baseUrl, headers: { cookie: await signIn(baseUrl, join(data, "demo-accounts.json")) } }, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}

async function answering(baseUrl: string, child: ChildProcess): Promise<void> {
  const deadline = Date.now() + startMinutes * 60_000;
  while (Date.now() < deadline) {
    if (child.exitCode !== null) throw new Error(`the server ended with code ${child.exitCode} before it answered.`);
    const healthy = await fetch(`${baseUrl}/api/health`).then((response) => response.ok, () => false);
    if (healthy) return;
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
  throw new Error(`the server did not answer within ${startMinutes} minutes.`);
}

const accountsSchema = z.array(z.object({ email: z.string(), password: z.string(), role: z.string() })).min(1);

async function signIn(baseUrl: string, accountsFile: string): Promise<string> {
  const accounts = accountsSchema.parse(JSON.parse(readFileSync(accountsFile, "utf8")));
  const account = accounts.find(({ role }) => role === "analyst") ?? accounts[0];
  const body = JSON.stringify({ email: account?.email, password: account?.password });
  const response = await fetch(`${baseUrl}/api/auth/sign-in/email`, { method: "POST", headers: { "content-type": "application/json", origin: baseUrl }, body });
  if (!response.ok) throw new Error(`signing in answered ${response.status}.`);
  return response.headers.getSetCookie().map((cookie) => cookie.split(";")[0]).join("; ");
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once("error", reject);
    probe.listen(0, "127.0.0.1", () => {
      const address = probe.address();
      probe.close(() => (typeof address === "object" && address !== null ? resolve(address.port) : reject(new Error("no free port was found."))));
    });
  });
}

/** Asks the server to stop and waits for it. */
async function ended(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const gone = new Promise((resolve) => child.once("exit", resolve));
  child.kill("SIGTERM");
  await gone;
}
