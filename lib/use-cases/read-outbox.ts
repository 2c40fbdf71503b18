import { readMode, type Mode } from "@/lib/auth/settings";
import { listMessages, type OutboxMessage } from "@/lib/email/outbox";

const open: Record<Mode, boolean> = { demonstration: true, development: true, test: true, production: false };

/**
 * The kept mail of an installation that sends none, the newest first. Null in production, whatever lies in the folder:
 * the letters carry links into accounts.
 */
export async function readOutbox(environment: NodeJS.ProcessEnv = process.env): Promise<OutboxMessage[] | null> {
  if (!open[readMode(environment)]) return null;
  return environment.OUTBOX_DIR ? listMessages(environment.OUTBOX_DIR) : [];
}
