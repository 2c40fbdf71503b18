import { AppError, type FieldError } from "@/lib/shared/app-error";
import { encodingOf, unpackBody } from "./unpack-body";

export const jsonLimitBytes = 2 ** 20;
export const importLimitBytes = 32 * 2 ** 20;

/**
 * A body as it arrives, cut off with AppError "too-large" as soon as more than `limitBytes` came, whatever length was announced.
 * Yields nothing for a request without a body.
 */
export async function* readChunks(request: Request, limitBytes: number): AsyncGenerator<Uint8Array> {
  const announced = Number(request.headers.get("content-length") ?? "0");
  if (announced > limitBytes) throw tooLarge(limitBytes);
  const reader = request.body?.getReader();
  if (!reader) return;
  let received = 0;
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) return;
      received += value.byteLength;
      if (received > limitBytes) throw tooLarge(limitBytes);
      yield value;
    }
  } finally {
    await reader.cancel().catch(() => undefined);
  }
}

/** The body as JSON, gzipped or not: at most 1 MiB of valid UTF-8. Throws AppError "too-large", "malformed", or "invalid" for text that can't be stored. */
export async function readJson(request: Request, limitBytes = jsonLimitBytes): Promise<unknown> {
  const chunks: Uint8Array[] = [];
  const announced = encodingOf(request.headers.get("content-encoding"));
  for await (const chunk of unpackBody(readChunks(request, limitBytes), { announced, limitBytes })) chunks.push(chunk);
  const value = parseJson(decodeUtf8(chunks));
  const fields = unstorableText(value);
  if (fields.length > 0) throw new AppError("invalid", "Some text can't be stored.", { fields });
  return value;
}

function decodeUtf8(chunks: readonly Uint8Array[]): string {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(Buffer.concat(chunks));
  } catch {
    throw new AppError("malformed", "The body is not valid UTF-8.");
  }
}

function parseJson(text: string): unknown {
  if (text.trim() === "") throw new AppError("malformed", "The body is empty; send JSON.");
  try {
    return JSON.parse(text);
  } catch {
    throw new AppError("malformed", "The body is not valid JSON.");
  }
}

function tooLarge(limitBytes: number): AppError {
  return new AppError("too-large", `The body is larger than ${limitBytes / 2 ** 20} MiB.`);
}

const loneSurrogate = /\p{Surrogate}/u;

export function isStorable(text: string): boolean {
  return !text.includes("\u0000") && !loneSurrogate.test(text);
}

/**
 * Where a parsed JSON value holds text that PostgreSQL can't: the character NUL, or half of a surrogate pair; in keys as well.
 * Walks without recursion, because nesting may be as deep as the body is long.
 */
export function unstorableText(value: unknown): FieldError[] {
  const found: FieldError[] = [];
  const waiting: { value: unknown; path: string }[] = [{ value, path: "" }];
  for (let next = waiting.pop(); next !== undefined && found.length < 20; next = waiting.pop()) {
    const { value: item, path } = next;
    if (typeof item === "string" && !isStorable(item)) found.push({ path, message: "This text holds a character that can't be stored (NUL or half a surrogate pair)." });
    if (typeof item !== "object" || item === null) continue;
    for (const [key, child] of Object.entries(item)) {
      if (!isStorable(key)) found.push({ path, message: "A name in here holds a character that can't be stored." });
      else if (path.length < 400) waiting.push({ value: child, path: path === "" ? key : `${path}.${key}` });
      else waiting.push({ value: child, path });
    }
  }
  return found;
}
