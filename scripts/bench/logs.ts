import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { createLogReader } from "../../lib/logs/log-reader";
import type { ParsedLog } from "../../lib/logs/parsed-log";

/**
 * Throughput and peak memory of the log reader on generated logs of 200 MB, fed in chunks of 64 KiB. Exits with 1 when
 * a goal is missed. Usage: npx tsx scripts/bench/logs.ts [megabytes]
 */
const megabytes = Number(process.argv[2] ?? 200);
const goal = { megabytesPerSecond: 40, memoryMiB: 64 };
const chunkBytes = 65_536;
const referenceFolder = join(fileURLToPath(new URL(".", import.meta.url)), "../../tests/reference/logs");

/** One long solve: monitor lines whose iteration grows, a converged reason at the end. */
function* longSolve(totalBytes: number): Generator<Uint8Array> {
  const encoder = new TextEncoder();
  let written = 0;
  let iteration = 0;
  while (written < totalBytes) {
    const lines: string[] = [];
    for (let bytes = 0; bytes < chunkBytes; iteration += 1) {
      const residual = (1 / (1 + iteration * 1e-4)).toExponential(12).replace(/e([+-])(\d)$/, "e$10$2");
      const line = `${String(iteration).padStart(3)} KSP preconditioned resid norm ${residual} true resid norm ${residual} ||r(i)||/||b|| ${residual}`;
      lines.push(line);
      bytes += line.length + 1;
    }
    const chunk = encoder.encode(`${lines.join("\n")}\n`);
    written += chunk.length;
    yield chunk;
  }
  yield encoder.encode(`Linear solve did not converge due to DIVERGED_ITS iterations ${iteration - 1}\n`);
}

/** The genuine logs one after the other, again and again, cut anywhere. */
function* genuineLogs(totalBytes: number): Generator<Uint8Array> {
  const names = readdirSync(referenceFolder).filter((name) => name.endsWith(".log")).sort();
  const block = Buffer.concat(names.map((name) => readFileSync(join(referenceFolder, name))));
  for (let written = 0; written < totalBytes; ) {
    for (let offset = 0; offset < block.length; offset += chunkBytes) {
      const chunk = block.subarray(offset, offset + chunkBytes);
      written += chunk.length;
      yield chunk;
    }
  }
}

type Measured = { bytes: number; seconds: number; wallSeconds: number; memoryMiB: number; parsed: ParsedLog };

/** Processor seconds of this process: what other programs on the machine take does not count. */
function processorSeconds(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
}

function measure(chunks: Generator<Uint8Array>): Measured {
  const reader = createLogReader();
  const total = { bytes: 0, seconds: 0, wallSeconds: 0 };
  const timed = <T>(step: () => T): T => {
    const [processor, wall] = [processorSeconds(), performance.now()];
    const value = step();
    total.seconds += processorSeconds() - processor;
    total.wallSeconds += (performance.now() - wall) / 1000;
    return value;
  };
  const baseline = process.memoryUsage().rss;
  let peak = baseline;
  // Chunks are made in batches of 1 MiB beforehand, so that only the reading is timed.
  for (let batch = take(chunks, 16); batch.length > 0; batch = take(chunks, 16)) {
    timed(() => batch.forEach((chunk) => reader.push(chunk)));
    for (const chunk of batch) total.bytes += chunk.length;
    peak = Math.max(peak, process.memoryUsage().rss);
  }
  const parsed = timed(() => reader.finish());
  peak = Math.max(peak, process.memoryUsage().rss);
  return { ...total, memoryMiB: (peak - baseline) / 2 ** 20, parsed };
}

function take(chunks: Generator<Uint8Array>, count: number): Uint8Array[] {
  const batch: Uint8Array[] = [];
  while (batch.length < count) {
    const next = chunks.next();
    if (next.done === true) break;
    batch.push(next.value);
  }
  return batch;
}

function report(name: string, { bytes, seconds, wallSeconds, memoryMiB, parsed }: Measured): boolean {
  const rate = bytes / 1e6 / seconds;
  const met = rate >= goal.megabytesPerSecond && memoryMiB <= goal.memoryMiB;
  const times = `${seconds.toFixed(2)} s of processor (${wallSeconds.toFixed(2)} s of wall)`;
  const figures = `${(bytes / 1e6).toFixed(0)} MB in ${times}: ${rate.toFixed(0)} MB/s (goal ${goal.megabytesPerSecond})`;
  const memory = `peak ${memoryMiB.toFixed(1)} MiB over the baseline (limit ${goal.memoryMiB})`;
  console.log(`${name}: ${figures}, ${memory}, ${parsed.linesRead} lines, ${parsed.solves ?? "unknown"} solves, ${met ? "met" : "MISSED"}`);
  return met;
}

const results = [
  report("genuine logs repeated", measure(genuineLogs(megabytes * 1e6))),
  report("one long solve", measure(longSolve(megabytes * 1e6))),
];
process.exitCode = results.every(Boolean) ? 0 : 1;
