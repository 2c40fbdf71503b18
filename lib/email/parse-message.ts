/** What the outbox shows of a message. */
export type ParsedMessage = { subject: string; to: string; from: string; text: string; html: string };

type Part = { headers: Map<string, string>; body: string };

/**
 * Reads a MIME message (RFC 2045, 2047, 5322) as mail programs of our own write it: text, HTML, or both as alternatives.
 * Attachments and other kinds of parts are passed over; a broken message gives empty texts, never an error.
 */
export function parseMessage(raw: string): ParsedMessage {
  const message = splitPart(raw.replaceAll(/\r\n/g, "\n"));
  const texts = { text: "", html: "" };
  collectTexts(message, texts, 0);
  const header = (name: string) => decodeWords(message.headers.get(name) ?? "");
  return { subject: header("subject"), to: header("to"), from: header("from"), ...texts };
}

const deepestNesting = 8;

function collectTexts(part: Part, texts: { text: string; html: string }, depth: number): void {
  const type = part.headers.get("content-type") ?? "text/plain";
  const boundary = /boundary="?([^";]+)"?/i.exec(type)?.[1];
  if (/^multipart\//i.test(type) && boundary !== undefined && depth < deepestNesting) {
    for (const piece of splitMultipart(part.body, boundary)) collectTexts(splitPart(piece), texts, depth + 1);
  } else if (/^text\/html/i.test(type)) {
    texts.html ||= decodeBody(part);
  } else if (/^text\/plain/i.test(type)) {
    texts.text ||= decodeBody(part);
  }
}

function splitPart(raw: string): Part {
  const end = raw.indexOf("\n\n");
  const head = end === -1 ? raw : raw.slice(0, end);
  // A line that begins with a blank continues the one before.
  const lines = head.replaceAll(/\n[ \t]+/g, " ").split("\n");
  const headers = new Map(lines.map((line) => {
    const colon = line.indexOf(":");
    return [line.slice(0, colon).trim().toLowerCase(), line.slice(colon + 1).trim()];
  }));
  return { headers, body: end === -1 ? "" : raw.slice(end + 2) };
}

function splitMultipart(body: string, boundary: string): string[] {
  const pieces = `\n${body}`.split(`\n--${boundary}`);
  // Before the first boundary stands a preamble, after the closing one ("--") an epilogue.
  return pieces.slice(1).filter((piece) => !piece.startsWith("--")).map((piece) => piece.replace(/^[ \t]*\n/, ""));
}

function decodeBody({ headers, body }: Part): string {
  const encoding = (headers.get("content-transfer-encoding") ?? "7bit").toLowerCase();
  if (encoding === "base64") return Buffer.from(body, "base64").toString("utf8");
  if (encoding === "quoted-printable") return decodeQuotedPrintable(body.replaceAll(/[ \t]*=\n/g, (ending) => ending.slice(0, -2)));
  // The raw message was read byte for byte.
  return Buffer.from(body, "latin1").toString("utf8");
}

function decodeQuotedPrintable(text: string): string {
  const bytes = text.replaceAll(/=([0-9A-Fa-f]{2})/g, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)));
  return Buffer.from(bytes, "latin1").toString("utf8");
}

function decodeWords(text: string): string {
  return text
    .replaceAll(/\?=\s+=\?/g, "?==?")
    .replaceAll(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_, encoding: string, word: string) =>
      encoding.toLowerCase() === "b" ? Buffer.from(word, "base64").toString("utf8") : decodeQuotedPrintable(word.replaceAll("_", " ")),
    );
}
