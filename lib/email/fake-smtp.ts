import { basename } from "node:path";
import { SMTPServer } from "smtp-server";
import { z } from "zod";
import { keepMessage } from "./outbox";

const largestMessageBytes = 1024 * 1024;

/**
 * A mail server that sends nothing: it takes every message on 127.0.0.1 and keeps it in `folder`.
 * Returns the port it listens on (a free one for port 0) and a way to stop it.
 */
export async function startFakeSmtp(options: { port: number; folder: string }): Promise<{ port: number; stop: () => Promise<void> }> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS", "AUTH"],
    disableReverseLookup: true,
    size: largestMessageBytes,
    onData(stream, session, done) {
      const chunks: Buffer[] = [];
      stream.on("data", (chunk: Buffer) => chunks.push(chunk));
      stream.on("error", done);
      stream.on("end", () => {
        const recipients = session.envelope.rcptTo.map(({ address }) => address);
        keepMessage(options.folder, Buffer.concat(chunks), recipients, new Date()).then(() => done(), done);
      });
    },
  });
  // Clients that hang up early are no reason to end.
  server.on("error", (error) => console.error("mail catcher:", error.message));
  await new Promise<void>((resolve, reject) => {
    server.server.once("error", reject);
    server.listen(options.port, "127.0.0.1", resolve);
  });
  const address = server.server.address();
  const port = typeof address === "object" && address !== null ? address.port : options.port;
  return { port, stop: () => new Promise<void>((resolve) => server.close(() => resolve())) };
}

async function main(): Promise<void> {
  const environment = z.object({ SMTP_PORT: z.coerce.number().int().min(1).max(65_535), OUTBOX_DIR: z.string().min(1) }).parse(process.env);
  const server = await startFakeSmtp({ port: environment.SMTP_PORT, folder: environment.OUTBOX_DIR });
  console.log(`Keeping mail of port ${server.port} in ${environment.OUTBOX_DIR}`);
  const stop = () => void server.stop().then(() => process.exit(0));
  process.once("SIGTERM", stop);
  process.once("SIGINT", stop);
}

// By the file's name, because bundled into another program this module must only offer its function.
if (/^fake-smtp\.(ts|mjs)$/.test(basename(process.argv[1] ?? ""))) {
  main().catch((error: unknown) => {
    console.error(error instanceof z.ZodError ? `Missing or unusable: ${error.issues.map(({ path }) => path.join(".")).join(", ")}` : error instanceof Error ? error.message : error);
    process.exitCode = 1;
  });
}
