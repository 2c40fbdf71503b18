/** Characters of one line that are kept; PETSc's own longest line is the configure line of a few thousand. */
const maximumLineLength = 16_384;
/** Bytes decoded at a time: small blocks die young and leave the heap as it was. */
const decodedBlock = 16_384;

const ascii = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true });
const anyByte = new TextDecoder("latin1");

/** One character a byte. Pure ASCII, nearly always the case, takes the engine's fast way and half the memory. */
function decode(bytes: Uint8Array): string {
  try {
    const text = ascii.decode(bytes);
    if (text.length === bytes.length) return text;
  } catch {
    // Not UTF-8: falls through to the decoder that takes every byte.
  }
  return anyByte.decode(bytes);
}

export type LineSink = (line: string, lineNumber: number) => void;

/**
 * Cuts a byte stream into lines, decoding one byte to one character (all that solvers print is ASCII; other bytes pass
 * through as they are). Lines longer than 16 384 characters are handed on cut, so memory stays constant. A NUL byte
 * ends the reading: such a file is no text. Ends of line: LF, CRLF.
 */
export function createLineSplitter(sink: LineSink) {
  let pending = "";
  let lineNumber = 0;
  let nulLine: number | null = null;
  let cutLines = 0;
  let bytes = 0;

  function emit(line: string): void {
    lineNumber += 1;
    if (line.length > maximumLineLength) {
      cutLines += 1;
      sink(line.slice(0, maximumLineLength), lineNumber);
    } else sink(line, lineNumber);
  }

  function keep(rest: string): void {
    // Beyond the limit the rest of the line is only counted, never stored.
    if (pending.length <= maximumLineLength) pending += rest;
  }

  function splitBlock(text: string): void {
    let start = 0;
    for (;;) {
      const end = text.indexOf("\n", start);
      if (end < 0) break;
      if (pending.length > 0) {
        keep(text.slice(start, end));
        const line = pending;
        pending = "";
        emit(line);
      } else emit(text.slice(start, end));
      start = end + 1;
    }
    if (start < text.length) keep(text.slice(start));
  }

  return {
    push(chunk: Uint8Array): void {
      if (nulLine !== null) return;
      bytes += chunk.length;
      const nul = chunk.indexOf(0);
      const readable = nul < 0 ? chunk : chunk.subarray(0, nul);
      for (let offset = 0; offset < readable.length; offset += decodedBlock) {
        splitBlock(decode(readable.subarray(offset, offset + decodedBlock)));
      }
      if (nul >= 0) nulLine = lineNumber + 1;
    },
    /** What stands behind the last end of line. */
    rest: () => pending,
    emitRest(): void {
      const line = pending;
      pending = "";
      if (line.length > 0) emit(line);
    },
    get lineNumber() {
      return lineNumber;
    },
    get nulLine() {
      return nulLine;
    },
    get cutLines() {
      return cutLines;
    },
    get bytes() {
      return bytes;
    },
  };
}
