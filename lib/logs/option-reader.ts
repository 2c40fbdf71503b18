import { keepString } from "@/lib/logs/keep-string";

const optionLimit = 400;

export type LoggedOption = { name: string; value: string | null };

/** Reads the option table and the list of unused options that PETSc prints at its end. */
export class OptionReader {
  private readonly table = new Map<string, string | null>();
  private readonly left = new Map<string, { value: string | null; line: number }>();
  private stated: { count: number; line: number } | null = null;
  private inTable = false;

  /** Takes a line of the table or of the list; false for all other lines. */
  take(text: string, line: number): boolean {
    const first = text.charCodeAt(0);
    // Number sign, hyphen, E, O, P, T open its lines.
    if (first !== 35 && first !== 45 && first !== 69 && first !== 79 && first !== 80 && first !== 84 && !this.inTable) return false;
    if (/^#?PETSc Option Table entries:/.test(text)) {
      this.inTable = true;
      return true;
    }
    if (/^#?End of PETSc Option Table/.test(text)) {
      this.inTable = false;
      return true;
    }
    const left = /^Option left: name:(-\S{1,200})(?: (?:value: (.{0,300}?)|\(?no value\)?))?(?: source: .*)?$/.exec(text.trimEnd());
    if (left?.[1] !== undefined) {
      if (this.left.size < optionLimit && !this.left.has(left[1])) this.left.set(keepString(left[1]), { value: keep(left[2]), line });
      return true;
    }
    const several = /^There (?:are (\d{1,6}) unused database options|is one unused database option)\b/.exec(text);
    if (several !== null) {
      this.stated = { count: several[1] === undefined ? 1 : Number(several[1]), line };
      return true;
    }
    if (!this.inTable) return false;
    const entry = /^(-[A-Za-z]\S{0,200})(?: (.{1,300}?))?(?: ?[#(] ?\(?source: .*)?$/.exec(text.trimEnd());
    if (entry?.[1] === undefined) this.inTable = false;
    else if (this.table.size < optionLimit) this.table.set(keepString(entry[1]), keep(entry[2]));
    return entry !== null;
  }

  options(): LoggedOption[] {
    return [...this.table].map(([name, value]) => ({ name, value }));
  }

  unused(): { name: string; line: number }[] {
    return [...this.left].map(([name, { line }]) => ({ name, line }));
  }

  /** How many unused options PETSc counted, null when it did not say. */
  get announced(): { count: number; line: number } | null {
    return this.stated;
  }
}

function keep(value: string | undefined): string | null {
  return value === undefined ? null : keepString(value);
}

