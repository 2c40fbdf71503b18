import { mkdtemp, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { appDatabase, authDatabase } from "@/db/client";
import { withSystemTeam } from "@/db/scope";
import { startFakeSmtp } from "@/lib/email/fake-smtp";
import { listMessages } from "@/lib/email/outbox";
import { closeTransport } from "@/lib/email/transport";
import { enqueue } from "@/lib/jobs/queue";
import { runWorker } from "@/lib/jobs/run-worker";
import { readOutbox } from "@/lib/use-cases/read-outbox";
import { startInstallation, type Installation } from "../support/accounts";

let installation: Installation;
let folder: string;
let smtp: Awaited<ReturnType<typeof startFakeSmtp>>;
let worker: Awaited<ReturnType<typeof runWorker>>;
const lines: string[] = [];

const letter = (subject: string) => ({ to: "guest@example.org", subject, text: "Grüße: https://example.org/a?b=c\n", html: "<p>Grüße</p>" });

beforeAll(async () => {
  installation = await startInstallation();
  folder = await mkdtemp(join(tmpdir(), "saddlemark-outbox-"));
  smtp = await startFakeSmtp({ port: 0, folder });
  process.env.SMTP_URL = `smtp://127.0.0.1:${smtp.port}`;
  worker = await runWorker({ connectionString: process.env.DATABASE_URL_AUTH ?? "", log: (line) => lines.push(line), signal: new AbortController().signal });
});
afterAll(async () => {
  await worker?.stop();
  closeTransport();
  await smtp?.stop();
  await installation?.close();
  await rm(folder, { recursive: true, force: true });
});

const arrivals = (subject: string) => vi.waitFor(async () => {
  const found = (await listMessages(folder)).filter((message) => message.subject === subject);
  expect(found).toHaveLength(1);
  return found[0];
}, { timeout: 30_000, interval: 200 });

describe("a job", () => {
  it("of either role is carried out: its letter arrives as it was written", async () => {
    await enqueue(authDatabase(), "send-email", letter("Einladung – an Zoë"));
    await withSystemTeam("any", (db) => enqueue(db, "send-email", letter("From a team")));
    expect(await arrivals("Einladung – an Zoë")).toMatchObject({ to: ["guest@example.org"], text: "Grüße: https://example.org/a?b=c\n", html: "<p>Grüße</p>" });
    await arrivals("From a team");
  });

  it("is gone when its transaction fails", async () => {
    const count = async () => (await installation.owner.query("select count(*)::int as n from jobs.job")).rows[0];
    const before = await count();
    const failing = appDatabase().transaction(async (db) => {
      await enqueue(db, "send-email", letter("Never sent"));
      throw new Error("no");
    });
    await expect(failing).rejects.toThrow("no");
    expect(await count()).toEqual(before);
  });

  it("with data that does not fit is refused before it is stored", async () => {
    await expect(enqueue(authDatabase(), "send-email", { ...letter("x"), to: "nobody" })).rejects.toThrow();
  });

  it("that fails is tried again later, with growing pauses, and ends among the failed", async () => {
    await installation.owner.query("insert into jobs.job (name, data, retry_limit, retry_delay, retry_backoff, dead_letter) values ('send-email', '{\"wrong\": true}', 1, 1, true, 'send-email.failed')");
    const failed = () => installation.owner.query("select data from jobs.job where name = 'send-email.failed'");
    await vi.waitFor(async () => expect((await failed()).rows).toEqual([{ data: { wrong: true } }]), { timeout: 30_000, interval: 250 });
    const { rows } = await installation.owner.query("select retry_count, state::text from jobs.job where name = 'send-email' and data = '{\"wrong\": true}'");
    expect(rows).toEqual([{ retry_count: 1, state: "failed" }]);
  });

  it("is carried out after every connection to the database broke", async () => {
    await installation.owner.query("select pg_terminate_backend(pid) from pg_stat_activity where datname = current_database() and pid <> pg_backend_pid()");
    await vi.waitFor(() => authDatabase().execute(sql`select 1`), { timeout: 10_000, interval: 100 });
    await enqueue(authDatabase(), "send-email", letter("After the break"));
    await arrivals("After the break");
  });

  it("leaves no address or link in the log", () => {
    expect(lines.length).toBeGreaterThan(0);
    expect(lines.filter((line) => /guest@|https?:/.test(line))).toEqual([]);
  });
});

describe("the outbox", () => {
  it.each([
    ["demonstration", true],
    ["development", true],
    ["test", true],
    ["production", false],
    ["", false],
    ["Demonstration ", false],
  ])("in mode %j is open: %s", async (mode, open) => {
    const letters = await readOutbox({ NODE_ENV: "production", SADDLEMARK_MODE: mode, OUTBOX_DIR: folder });
    expect(letters !== null).toBe(open);
    if (open) expect(letters?.length).toBeGreaterThan(0);
  });
});
