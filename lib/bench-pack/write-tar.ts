export type TarFile = { path: string; text: string; executable?: boolean };

const blockBytes = 512;
/** Field widths of the header of POSIX.1-1988 (ustar), in bytes. */
const nameBytes = 100;
const prefixBytes = 155;

/**
 * Files as an uncompressed tar archive in the ustar format (IEEE Std 1003.1, pax, "ustar Interchange Format"): regular files owned by nobody in
 * particular, all with one time of change, so that the same files always give the same bytes. Folders come into being by their files' paths.
 * Throws on a path that the format can't hold.
 */
export function writeTar(files: readonly TarFile[], modified: Date): Uint8Array {
  const encoder = new TextEncoder();
  const parts = files.flatMap((file) => {
    const content = encoder.encode(file.text);
    const padding = new Uint8Array((blockBytes - (content.length % blockBytes)) % blockBytes);
    return [header(file, content.length, modified), content, padding];
  });
  // Two blocks of zeros end an archive.
  return concatenate([...parts, new Uint8Array(2 * blockBytes)]);
}

function header({ path, executable = false }: TarFile, size: number, modified: Date): Uint8Array {
  const block = new Uint8Array(blockBytes);
  const encoder = new TextEncoder();
  const put = (text: string, at: number) => block.set(encoder.encode(text), at);
  const { name, prefix } = splitPath(path);
  put(name, 0);
  put(octal(executable ? 0o755 : 0o644, 7), 100);
  put(octal(0, 7), 108);
  put(octal(0, 7), 116);
  put(octal(size, 11), 124);
  put(octal(Math.floor(modified.getTime() / 1000), 11), 136);
  // The sum is taken with its own field full of spaces.
  put(" ".repeat(8), 148);
  put("0", 156);
  put("ustar\0", 257);
  put("00", 263);
  put(octal(0, 7), 329);
  put(octal(0, 7), 337);
  put(prefix, 345);
  const sum = block.reduce((total, byte) => total + byte, 0);
  put(`${octal(sum, 6)}\0 `, 148);
  return block;
}

/** A path as the header's two fields hold it: cut at a slash when it is longer than the first. */
function splitPath(path: string): { name: string; prefix: string } {
  if (!/^[\x21-\x7e]+$/.test(path) || path.startsWith("/") || path.split("/").includes("..")) throw new Error(`A path in an archive is relative and plain: ${path}`);
  if (path.length <= nameBytes) return { name: path, prefix: "" };
  const cut = path.lastIndexOf("/", prefixBytes);
  const name = path.slice(cut + 1);
  if (cut < 1 || name === "" || name.length > nameBytes) throw new Error(`The path is too long for the format: ${path}`);
  return { name, prefix: path.slice(0, cut) };
}

function octal(value: number, digits: number): string {
  const text = value.toString(8);
  if (text.length > digits) throw new Error(`${value} does not fit the format.`);
  return text.padStart(digits, "0");
}

function concatenate(parts: readonly Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(parts.reduce((total, part) => total + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
