import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { createLogReader, type LogReaderOptions } from "@/lib/logs/log-reader";
import type { ParsedLog } from "@/lib/logs/parsed-log";

export const logFolder = join(process.cwd(), "tests/reference/logs");

export const logNames = readdirSync(logFolder)
  .filter((name) => name.endsWith(".log"))
  .sort();

export function logText(name: string): string {
  return readFileSync(join(logFolder, name), "latin1");
}

/** Reads a text as the reader would get it from a stream, in chunks of the given size. */
export function readText(text: string, options: LogReaderOptions = {}, chunkBytes = 4_096): ParsedLog {
  const bytes = Buffer.from(text, "latin1");
  const reader = createLogReader(options);
  for (let offset = 0; offset < bytes.length; offset += chunkBytes) reader.push(bytes.subarray(offset, offset + chunkBytes));
  return reader.finish();
}

/** Fields that hold one value; what a damaged log must never get wrong. */
export const singleValues = [
  "strategy", "krylovMethod", "outcome", "reason", "iterations", "processes", "setupSeconds", "solveSeconds",
  "peakMemoryGiB", "trueRelativeResidual", "monitoredRelativeResidual", "monitoredNorm", "factorEntries",
  "preconditioner", "factorisation", "factorPackage", "systemUnknowns", "restart",
] as const;
