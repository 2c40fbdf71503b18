import { randomBytes } from "node:crypto";
import { mkdir, readdir, readFile, rename, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { z } from "zod";
import { parseMessage } from "./parse-message";

const messageSchema = z.object({
  id: z.string(),
  receivedAt: z.iso.datetime(),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
});
export type OutboxMessage = z.infer<typeof messageSchema>;

/** Keeps a message that would have been sent as a JSON file of its own; complete or not there at all. */
export async function keepMessage(folder: string, raw: Buffer, recipients: readonly string[], receivedAt: Date): Promise<OutboxMessage> {
  const parsed = parseMessage(raw.toString("latin1"));
  const id = `${receivedAt.toISOString().replaceAll(/[:.]/g, "-")}-${randomBytes(4).toString("hex")}`;
  const message: OutboxMessage = { ...parsed, id, receivedAt: receivedAt.toISOString(), to: [...recipients] };
  await mkdir(folder, { recursive: true });
  const path = join(folder, `${id}.json`);
  await writeFile(`${path}.part`, `${JSON.stringify(message, null, 2)}\n`, { mode: 0o600 });
  await rename(`${path}.part`, path);
  return message;
}

/** The kept messages, the newest first; files that are none are passed over. */
export async function listMessages(folder: string, limit = 100): Promise<OutboxMessage[]> {
  const names = await readdir(folder).catch(() => []);
  const newest = names.filter((name) => name.endsWith(".json")).sort().reverse().slice(0, limit);
  const messages = await Promise.all(newest.map((name) => readMessage(join(folder, name))));
  return messages.filter((message) => message !== undefined);
}

async function readMessage(path: string): Promise<OutboxMessage | undefined> {
  try {
    return messageSchema.parse(JSON.parse(await readFile(path, "utf8")));
  } catch {
    return undefined;
  }
}
