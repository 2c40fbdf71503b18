import { Readable, pipeline } from "node:stream";
import { createGunzip } from "node:zlib";
import { AppError } from "@/lib/shared/app-error";

export const bodyEncodings = ["identity", "gzip"] as const;
export type BodyEncoding = (typeof bodyEncodings)[number];

type Chunks = AsyncIterable<Uint8Array>;

/**
 * A body as it was before it was packed: gzip is known by its first two bytes, so a compressed file that was dropped is read as well as a
 * body that says Content-Encoding. Holds one chunk at a time. Throws AppError "too-large" as soon as more than `limitBytes`
 * came out, "malformed" for gzip data that is damaged or cut.
 */
export async function* unpackBody(chunks: Chunks, { announced, limitBytes }: { announced: BodyEncoding; limitBytes: number }): AsyncGenerator<Uint8Array> {
  const { zipped, all } = await sniff(chunks);
  if (announced === "gzip" && zipped === false) throw new AppError("malformed", "The body is announced as gzip and is not.");
  let unpacked = 0;
  for await (const chunk of zipped === true ? gunzip(all) : all) {
    unpacked += chunk.byteLength;
    if (unpacked > limitBytes) throw new AppError("too-large", `The body is larger than ${limitBytes / 2 ** 20} MiB unpacked.`);
    yield chunk;
  }
}

/** What Content-Encoding announces. Throws AppError "unsupported-media" for anything but gzip. */
export function encodingOf(header: string | null): BodyEncoding {
  const name = (header ?? "identity").trim().toLowerCase();
  if (name === "identity" || name === "") return "identity";
  if (name === "gzip" || name === "x-gzip") return "gzip";
  throw new AppError("unsupported-media", "Send the body as it is or with Content-Encoding: gzip.");
}

/** Looks at the first two bytes without losing them; null for a body of fewer. */
async function sniff(chunks: Chunks): Promise<{ zipped: boolean | null; all: Chunks }> {
  const source = chunks[Symbol.asyncIterator]();
  const seen: Uint8Array[] = [];
  let length = 0;
  while (length < 2) {
    const { done, value } = await source.next();
    if (done === true) break;
    seen.push(value);
    length += value.byteLength;
  }
  const [first, second] = Buffer.concat(seen);
  return { zipped: length < 2 ? null : first === 0x1f && second === 0x8b, all: chain(seen, source) };
}

async function* chain(seen: readonly Uint8Array[], source: AsyncIterator<Uint8Array>): AsyncGenerator<Uint8Array> {
  try {
    yield* seen;
    for (let next = await source.next(); next.done !== true; next = await source.next()) yield next.value;
  } finally {
    await source.return?.();
  }
}

async function* gunzip(chunks: Chunks): AsyncGenerator<Uint8Array> {
  const inflate = createGunzip();
  // Its errors come out of the loop below; the callback only keeps them from being thrown a second time.
  pipeline(Readable.from(chunks, { objectMode: true, highWaterMark: 1 }), inflate, () => undefined);
  try {
    for await (const piece of inflate) yield piece;
  } catch (error) {
    if (error instanceof AppError) throw error;
    const damaged = error instanceof Error && "code" in error && typeof error.code === "string" && error.code.startsWith("Z_");
    if (!damaged) throw error;
    throw new AppError("malformed", "The gzip data is damaged or cut. Send it anew, or without compression.");
  }
}
