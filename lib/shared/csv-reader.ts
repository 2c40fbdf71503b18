/** A record of a CSV file with the line on which it began, counted from 1. */
export type CsvRecord = { line: number; cells: string[] };

const longestRecord = 2 ** 20;

/**
 * Reads CSV (RFC 4180; line ends CRLF, LF or CR) in pieces of any length. Blank lines are skipped, a byte order mark is dropped.
 * Throws SyntaxError, naming the line, on text after a closing quote, a quote inside a bare cell, a quote never closed, or a record over 1 MiB.
 */
export class CsvReader {
  private state: "start" | "bare" | "quoted" | "closed" = "start";
  private cell = "";
  private cells: string[] = [];
  private line = 1;
  private recordLine = 1;
  private length = 0;
  private afterReturn = false;
  private begun = false;

  /** Records completed by this piece. */
  push(text: string): CsvRecord[] {
    const records: CsvRecord[] = [];
    const piece = !this.begun && text.startsWith("\ufeff") ? text.slice(1) : text;
    this.begun ||= text.length > 0;
    for (const character of piece) {
      const record = this.step(character);
      if (record) records.push(record);
    }
    return records;
  }

  /** The last record, when the file does not end with a line end. */
  end(): CsvRecord[] {
    if (this.state === "quoted") throw this.problem("a quoted cell is never closed", this.recordLine);
    const record = this.closeRecord();
    return record ? [record] : [];
  }

  private step(character: string): CsvRecord | null {
    const secondOfPair = this.afterReturn && character === "\n";
    this.afterReturn = false;
    if (secondOfPair) return null;
    if (++this.length > longestRecord) throw this.problem("the record is longer than 1 MiB", this.recordLine);
    if (this.state === "quoted") return this.inQuotes(character);
    if (this.state === "closed" && character === '"') return this.doubledQuote();
    if (character === ",") this.closeCell();
    else if (character === "\n" || character === "\r") return this.lineEnd(character);
    else if (this.state === "closed") throw this.problem("text stands after a closing quote", this.line);
    else if (character === '"') this.openQuote();
    else this.addBare(character);
    return null;
  }

  private inQuotes(character: string): null {
    if (character === '"') this.state = "closed";
    else {
      this.cell += character;
      if (character === "\n") this.line++;
    }
    return null;
  }

  /** Two quotes inside quotes are one. */
  private doubledQuote(): null {
    this.cell += '"';
    this.state = "quoted";
    return null;
  }

  private openQuote(): void {
    if (this.state === "bare") throw this.problem("a quote stands inside a cell that is not quoted", this.line);
    this.state = "quoted";
  }

  private addBare(character: string): void {
    this.state = "bare";
    this.cell += character;
  }

  private closeCell(): void {
    this.cells.push(this.cell);
    this.cell = "";
    this.state = "start";
  }

  private lineEnd(character: string): CsvRecord | null {
    this.afterReturn = character === "\r";
    const record = this.closeRecord();
    this.line++;
    this.recordLine = this.line;
    return record;
  }

  private closeRecord(): CsvRecord | null {
    const isBlank = this.cells.length === 0 && this.cell === "" && this.state === "start";
    if (!isBlank) this.closeCell();
    const record = isBlank ? null : { line: this.recordLine, cells: this.cells };
    this.cells = [];
    this.length = 0;
    this.state = "start";
    return record;
  }

  private problem(what: string, line: number): SyntaxError {
    return new SyntaxError(`Line ${line}: ${what}.`);
  }
}
