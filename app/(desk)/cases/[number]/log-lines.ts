/** How far into a file lines are looked for: what a log says of itself stands at its ends, but no browser should stall on a huge one. */
const mostBytes = 64 * 2 ** 20;

/** The text of some lines of a log, by their number from 1; gzipped files are unpacked as they stream. Lines beyond 64 MiB are left out. */
export async function readLines(log: Blob, wanted: ReadonlySet<number>): Promise<Record<number, string>> {
  const found: Record<number, string> = {};
  const last = Math.max(0, ...wanted);
  const decoder = new TextDecoder("latin1");
  const reader = await openLog(log);
  let rest = "";
  let number = 1;
  let bytes = 0;
  try {
    for (let next = await reader.read(); !next.done && number <= last && bytes < mostBytes; next = await reader.read()) {
      bytes += next.value.byteLength;
      const lines = (rest + decoder.decode(next.value, { stream: true })).split("\n");
      rest = lines.pop() ?? "";
      for (const line of lines) {
        if (wanted.has(number)) found[number] = line.slice(0, 400);
        number += 1;
      }
    }
  } finally {
    await reader.cancel().catch(() => undefined);
  }
  return found;
}

/** Enough of a log to try a format on without stalling the page. */
const sampleBytes = 512 * 1024;

/** The first half MiB of a log as text. */
export async function readBeginning(log: Blob): Promise<string> {
  const decoder = new TextDecoder();
  const reader = await openLog(log);
  let text = "";
  try {
    for (let next = await reader.read(); !next.done && text.length < sampleBytes; next = await reader.read()) text += decoder.decode(next.value, { stream: true });
  } finally {
    await reader.cancel().catch(() => undefined);
  }
  return text.slice(0, sampleBytes);
}

async function openLog(log: Blob): Promise<ReadableStreamDefaultReader<Uint8Array>> {
  return (await isGzip(log)) ? log.stream().pipeThrough(new DecompressionStream("gzip")).getReader() : log.stream().getReader();
}

async function isGzip(log: Blob): Promise<boolean> {
  const [first, second] = new Uint8Array(await log.slice(0, 2).arrayBuffer());
  return first === 0x1f && second === 0x8b;
}
