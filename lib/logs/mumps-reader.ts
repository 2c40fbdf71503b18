import { keepString } from "@/lib/logs/keep-string";

const statistic = /^(?:-+ *|\*\* )?(?:.{0,60}\()?(RINFOG|INFOG|ICNTL)? ?\((\d{1,2})\)[^=:]{0,60}(?:=|\)?:) *(-?\d+(?:\.\d+)?(?:[DE][+-]\d{2,3})?)$/;
const returned = /^On return from [SDCZ]MUMPS, INFOG\(([12])\)= *(-?\d{1,18})$/;
const entering = /^Entering [SDCZ]MUMPS (\d+\.\d+(?:\.\d+)?\w{0,10}) from /;
/** First characters of MUMPS' lines: E, I, O, R, -, *. */
const opensWith = new Set([69, 73, 79, 82, 45, 42]);
/** Names that stand for the same thing when printed without `INFOG`. */
const wanted = new Set(["RINFOG(1)", "RINFOG(3)", "INFOG(1)", "INFOG(2)", "INFOG(13)", "INFOG(20)", "INFOG(22)", "INFOG(29)", "ICNTL(35)"]);

/** Statistics MUMPS prints itself (ICNTL(4) >= 2), by name such as `INFOG(29)`; each factorisation adds its own value. */
export class MumpsReader {
  private readonly values = new Map<string, { value: number; line: number; distinct: number }>();
  private foundVersion: string | null = null;
  private family = "INFOG";

  private state(name: string, value: number, line: number): void {
    const known = this.values.get(name);
    if (known === undefined) this.values.set(keepString(name), { value, line, distinct: 1 });
    else if (known.value !== value) known.distinct += 1;
  }

  /** Takes a line when it is one of MUMPS' own; false otherwise. */
  take(text: string, line: number): boolean {
    if (text.length > 200 || !text.includes("(") || !opensWith.has(text.charCodeAt(0))) return false;
    const entered = entering.exec(text);
    if (entered !== null) {
      this.foundVersion = entered[1] === undefined ? null : keepString(entered[1]);
      return true;
    }
    const end = returned.exec(text);
    if (end !== null) {
      this.state(`INFOG(${end[1]})`, Number(end[2]), line);
      return true;
    }
    const match = statistic.exec(text);
    if (match === null) return false;
    // `------(3)  Operations ...` continues the family of the line above, `-- (20) ...` is always INFOG.
    this.family = match[1] ?? (text.startsWith("---") ? this.family : "INFOG");
    const name = `${this.family}(${match[2]})`;
    const value = Number((match[3] ?? "").replace("D", "e"));
    if (!wanted.has(name) || !Number.isFinite(value)) return true;
    // Success of the analysis is printed as INFOG(1) = 0; only the return of a failed phase counts.
    if (!name.startsWith("INFOG(1)") && !name.startsWith("INFOG(2)")) this.state(name, value, line);
    return true;
  }

  /** The value when every factorisation of the log printed the same one. */
  value(name: string): { value: number; line: number } | null {
    const found = this.values.get(name);
    return found === undefined || found.distinct > 1 ? null : { value: found.value, line: found.line };
  }

  /** Distinct values printed under a name. */
  distinct(name: string): number {
    return this.values.get(name)?.distinct ?? 0;
  }

  get version(): string | null {
    return this.foundVersion;
  }
}

/** MUMPS gives large counts as minus the number of millions. */
export function countOf(value: number): number {
  return value < 0 ? -value * 1e6 : value;
}
