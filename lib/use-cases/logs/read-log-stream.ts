import { createHash } from "node:crypto";
import { createLogReader } from "@/lib/logs/log-reader";
import { createMappedLogReader } from "@/lib/logs/mapped-log-reader";
import type { LogMapping } from "@/lib/logs/mapping";
import type { ParsedLog } from "@/lib/logs/parsed-log";
import { AppError } from "@/lib/shared/app-error";

/** Residuals kept of one solve: enough for any chart, few enough for a row of the database. */
const historyLimit = 4000;

export type ReadStream = { parsed: ParsedLog; bytes: number; sha256: string };

/**
 * Reads a log as it arrives, in constant memory, by the team's mapping where one is given. Throws AppError "invalid" for a file that is
 * empty, binary or all blank, "too-large" and "malformed" as its chunks do.
 */
export async function readLogStream(chunks: AsyncIterable<Uint8Array>, mapping: LogMapping | null): Promise<ReadStream> {
  const reader = mapping === null ? createLogReader({ historyLimit }) : createMappedLogReader(mapping, { historyLimit });
  const hash = createHash("sha256");
  let bytes = 0;
  for await (const chunk of chunks) {
    if (chunk.includes(0)) throw refused("The file holds NUL bytes: it is binary, or text in UTF-16. Save the log as UTF-8 text and send it again.");
    bytes += chunk.byteLength;
    hash.update(chunk);
    reader.push(chunk);
  }
  if (bytes === 0) throw refused("The log is empty. Check that the job wrote to this file.");
  return { parsed: reader.finish(), bytes, sha256: hash.digest("hex") };
}

function refused(message: string): AppError {
  return new AppError("invalid", message, { fields: [{ path: "body", message }] });
}
