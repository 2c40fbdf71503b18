import { createHash } from "node:crypto";
import { unstorableText } from "@/lib/api/read-body";
import { headerErrors, parseImportRow, rowFromCells, type ImportRow } from "@/lib/runs/import-row";
import { AppError, type FieldError } from "@/lib/shared/app-error";
import { CsvReader, type CsvRecord } from "@/lib/shared/csv-reader";

export type ImportFormat = "csv" | "ndjson";
/** Rows with their place in the file, counted from 1 without the header, and the hash of all bytes. */
export type ReadImport = { rows: { place: number; row: ImportRow }[]; hash: string };

const mostRows = 100_000;
const mostErrors = 100;

/** Reads a whole import as it arrives. Throws AppError "malformed" for text that is neither, "invalid" with every faulty row (the first 100). */
export async function readImport(chunks: AsyncIterable<Uint8Array>, format: ImportFormat): Promise<ReadImport> {
  const hash = createHash("sha256");
  const collector = new RowCollector();
  const read = format === "csv" ? csvFeeder(collector) : lineFeeder(collector);
  const decoder = new TextDecoder("utf-8", { fatal: true });
  try {
    for await (const chunk of chunks) {
      hash.update(chunk);
      read.push(decoder.decode(chunk, { stream: true }));
    }
    read.push(decoder.decode());
    read.end();
  } catch (error) {
    if (error instanceof AppError) throw error;
    throw new AppError("malformed", error instanceof SyntaxError ? error.message : "The body is not valid UTF-8.");
  }
  return { rows: collector.finish(), hash: hash.digest("hex") };
}

type Feeder = { push: (text: string) => void; end: () => void };

class RowCollector {
  private readonly rows: { place: number; row: ImportRow }[] = [];
  private readonly errors: FieldError[] = [];
  private faulty = 0;
  private place = 0;

  add(value: unknown): void {
    this.place++;
    if (this.place > mostRows) throw new AppError("invalid", `An import has at most ${mostRows} rows; send it in parts.`);
    const unstorable = unstorableText(value);
    const result = unstorable.length > 0 ? { errors: unstorable } : parseImportRow(value);
    if ("row" in result) this.rows.push({ place: this.place, row: result.row });
    else this.refuse(result.errors);
  }

  refuse(errors: readonly FieldError[]): void {
    this.faulty++;
    this.errors.push(...errors.slice(0, Math.max(0, mostErrors - this.errors.length)).map(({ path, message }) => ({ path: rowPath(this.place, path), message })));
  }

  next(): number {
    return ++this.place;
  }

  finish() {
    if (this.faulty > 0) throw importRefused(this.faulty, this.errors);
    if (this.rows.length === 0) throw new AppError("invalid", "The import holds no rows.");
    return this.rows;
  }
}

export function rowPath(place: number, path: string): string {
  return path === "" ? `rows.${place}` : `rows.${place}.${path}`;
}

export function importRefused(faulty: number, fields: readonly FieldError[]): AppError {
  return new AppError("invalid", `${faulty} ${faulty === 1 ? "row" : "rows"} can't be imported; nothing was.`, { fields });
}

function csvFeeder(collector: RowCollector): Feeder {
  const reader = new CsvReader();
  let header: string[] | null = null;
  const take = ({ line, cells }: CsvRecord) => {
    if (header === null) {
      header = cells.map((cell) => cell.trim());
      const errors = headerErrors(header);
      if (errors.length > 0) throw new AppError("invalid", "The header line can't be used.", { fields: errors });
    } else if (cells.length > header.length) {
      collector.next();
      collector.refuse([{ path: "", message: `Line ${line} has ${cells.length} cells, the header ${header.length}.` }]);
    } else {
      collector.add(rowFromCells(header, cells));
    }
  };
  return { push: (text) => reader.push(text).forEach(take), end: () => reader.end().forEach(take) };
}

function lineFeeder(collector: RowCollector): Feeder {
  let rest = "";
  const take = (line: string) => {
    if (line.trim() === "") return;
    const value = parseLine(line);
    if (value === undefined) {
      collector.next();
      collector.refuse([{ path: "", message: "This line is not valid JSON." }]);
    } else collector.add(value);
  };
  return {
    push: (text) => {
      const lines = (rest + text).split("\n");
      rest = lines.pop() ?? "";
      if (rest.length > 2 ** 20) throw new SyntaxError("A line is longer than 1 MiB.");
      lines.forEach(take);
    },
    end: () => take(rest),
  };
}

/** Undefined, which JSON can't say, for a line that is none. */
function parseLine(line: string): unknown {
  try {
    return JSON.parse(line);
  } catch {
    return undefined;
  }
}
