import { keepString } from "@/lib/logs/keep-string";
import { createClaim, type Claim } from "@/lib/logs/claim";
import { factorPackages, krylovTypes, preconditionerTypes } from "@/lib/logs/solver-types";

export type ViewKind = "KSP" | "PC" | "Mat";

/** One object of the printed solver tree. `role` says under which heading it stood. */
export type ViewNode = {
  kind: ViewKind;
  prefix: string;
  processes: number | null;
  indent: number;
  line: number;
  role: "solver" | "split" | "velocity-solver" | "schur-solver" | "factor" | "system" | "other";
  type: Claim<string>;
  /** Numbers such as `rtol`, `restart`, `rows`, `nonzeros`, `INFOG(29)`, with their line. */
  numbers: Map<string, Claim<number>> | null;
  /** Words such as `norm`, `composition`, `factorisation`, `hypre`, `package`, `guess`. */
  words: Map<string, Claim<string>> | null;
  children: ViewNode[];
};

export type SolverView = {
  line: number;
  lastLine: number;
  krylov: ViewNode;
  preconditioner: ViewNode | null;
  /** Whether the system matrix, the last thing printed, was reached. */
  complete: boolean;
  /** Whether a second tree began inside this one. */
  mixed: boolean;
};

const nodeLimit = 4_000;
const header = /^(KSP|PC|Mat) Object: ?(?:\(([^)\s]{1,200})\) ?)?(?:(\d{1,8}) MPI process(?:es)?)?$/;

export function readViewHeader(text: string): { kind: ViewKind; prefix: string; processes: number | null } | null {
  const match = header.exec(text);
  if (match === null) return null;
  const kind = match[1] === "KSP" ? "KSP" : match[1] === "PC" ? "PC" : "Mat";
  return { kind, prefix: keepString(match[2] ?? ""), processes: match[3] === undefined ? null : Number(match[3]) };
}

function number(node: ViewNode, name: string, printed: string | undefined, line: number): void {
  const value = Number(printed);
  if (printed === undefined || printed === "" || !Number.isFinite(value)) return;
  const key = keepString(name);
  const known = (node.numbers ??= new Map());
  const claim = known.get(key) ?? createClaim<number>();
  claim.state(value, line);
  known.set(key, claim);
}

function word(node: ViewNode, name: string, value: string | undefined, line: number): void {
  if (value === undefined) return;
  const known = (node.words ??= new Map());
  const claim = known.get(name) ?? createClaim<string>();
  claim.state(keepString(value), line);
  known.set(name, claim);
}

type Reader = { pattern: RegExp; read: (node: ViewNode, match: RegExpExecArray, line: number) => void };

const readers: Record<ViewKind, readonly Reader[]> = {
  KSP: [
    { pattern: /^(?:GMRES: )?restart=(\d{1,9})(?:,|$)/, read: (node, match, line) => number(node, "restart", match[1], line) },
    {
      pattern: /^maximum iterations=(\d{1,10})(?:, (initial guess is zero|nonzero initial guess))?$/,
      read: (node, match, line) => {
        number(node, "maximumIterations", match[1], line);
        word(node, "guess", match[2], line);
      },
    },
    {
      pattern: /^tolerances: +relative=([\d.e+-]{1,30}), absolute=([\d.e+-]{1,30}), divergence=([\d.e+-]{1,30})$/,
      read: (node, match, line) => {
        number(node, "relative", match[1], line);
        number(node, "absolute", match[2], line);
        number(node, "divergence", match[3], line);
      },
    },
    { pattern: /^using (\w{4,20}) norm type for convergence test$/, read: (node, match, line) => word(node, "norm", match[1], line) },
  ],
  PC: [
    {
      pattern: /^FieldSplit with (\w{4,30}) composition: total splits = (\d{1,4})/,
      read: (node, match, line) => {
        word(node, "composition", match[1], line);
        number(node, "splits", match[2], line);
      },
    },
    {
      pattern: /^FieldSplit with Schur preconditioner,.{0,40} factorization (DIAG|LOWER|UPPER|FULL)$/,
      read: (node, match, line) => {
        word(node, "composition", "SCHUR", line);
        word(node, "factorisation", match[1], line);
      },
    },
    { pattern: /^HYPRE (BoomerAMG|ADS|AMS|Euclid|ParaSails|Pilut|ILU)\b/i, read: (node, match, line) => word(node, "hypre", match[1]?.toLowerCase(), line) },
    { pattern: /^linear system matrix( ?=|,? followed by|, which)/, read: (node, match, line) => word(node, "matrices", match[1]?.includes("followed") === true ? "two" : "one", line) },
  ],
  Mat: [
    {
      pattern: /^rows=(\d{1,15}), cols=(\d{1,15})(?:, bs=\d+)?$/,
      read: (node, match, line) => {
        number(node, "rows", match[1], line);
        number(node, "cols", match[2], line);
      },
    },
    {
      pattern: /^package used to perform factorization: (\S{1,40})$/,
      read: (node, match, line) => word(node, "package", factorPackages.has(match[1] ?? "") ? match[1] : undefined, line),
    },
    { pattern: /^total: nonzeros=(\d{1,18}), allocated nonzeros=/, read: (node, match, line) => number(node, "nonzeros", match[1], line) },
    {
      pattern: /^\((\d),(\d)\) : (NULL|(?:prefix="([^"\s]{1,200})", )?type=\w+, rows=\d+, cols=\d+)$/,
      read: (node, match, line) => word(node, `block ${match[1]}${match[2]}`, match[3] === "NULL" ? "none" : (match[4] ?? "unnamed"), line),
    },
    {
      pattern: /^(RINFOG\(3\)|INFOG\((?:13|2[01289]|3[456])\)|ICNTL\(35\)) .*: (-?\d[\d.]*(?:e[+-]\d{2,3})?)$/,
      read: (node, match, line) => number(node, match[1] ?? "", match[2], line),
    },
  ],
};

/** Letters that a line of each kind can begin with. */
const firstLetters: Record<ViewKind, string> = { KSP: "Grmtu", PC: "FHl", Mat: "rpt(RI" };

function roleOf(heading: string): ViewNode["role"] {
  if (heading.startsWith("Split number")) return "split";
  if (heading.startsWith("KSP solver for A00 block")) return "velocity-solver";
  if (heading.startsWith("KSP solver for S = ")) return "schur-solver";
  if (heading.startsWith("Factored matrix follows")) return "factor";
  return heading.startsWith("linear system matrix") ? "system" : "other";
}

/** Collects a printed solver tree line by line; at most 4 000 objects. */
export class ViewBuilder {
  /** Column of the tree's first line. */
  readonly base: number;
  private readonly line: number;
  private readonly krylov: ViewNode;
  private readonly stack: ViewNode[];
  private preconditioner: ViewNode | null = null;
  private heading = "";
  private nodes = 1;
  private lastLine: number;
  private complete = false;
  private mixed = false;

  constructor(text: string, indent: number, line: number) {
    const top = readViewHeader(text);
    this.base = indent;
    this.line = line;
    this.lastLine = line;
    this.krylov = createNode(top?.kind ?? "KSP", top?.prefix ?? "", top?.processes ?? null, indent, line, "solver");
    this.stack = [this.krylov];
  }

  private addNode(found: NonNullable<ReturnType<typeof readViewHeader>>, at: number, lineNumber: number): void {
    while (this.stack.length > 0 && (this.stack[this.stack.length - 1]?.indent ?? -1) >= at) this.stack.pop();
    const parent = this.stack[this.stack.length - 1];
    const node = createNode(found.kind, found.prefix, found.processes, at, lineNumber, at === this.base ? "solver" : roleOf(this.heading));
    if (at === this.base && found.kind === "PC" && this.preconditioner === null) this.preconditioner = node;
    else if (at === this.base) this.mixed = true;
    if (parent !== undefined && this.nodes < nodeLimit) parent.children.push(node);
    this.nodes += 1;
    this.stack.push(node);
    if (found.kind !== "Mat" || at !== this.base + 2) return;
    this.complete = this.complete || node.role === "system";
  }

  /** Takes one line; false when the line no longer belongs to the tree. */
  take(lineText: string, lineIndent: number, lineNumber: number): boolean {
    const found = readViewHeader(lineText);
    if (lineIndent <= this.base && found === null) return false;
    if (found !== null && lineIndent === this.base && found.kind === "KSP" && this.complete) return false;
    this.lastLine = lineNumber;
    if (found !== null) {
      this.addNode(found, lineIndent, lineNumber);
      return true;
    }
    const next = roleOf(lineText);
    if (next !== "other" || lineText.startsWith("KSP ")) this.heading = lineText;
    const owner = ownerOf(this.stack, lineIndent);
    if (owner !== null) readProperty(owner, lineText, lineIndent, lineNumber);
    return true;
  }

  finish(): SolverView {
    const { line, lastLine, krylov, preconditioner, complete, mixed } = this;
    return { line, lastLine, krylov, preconditioner, complete, mixed };
  }
}

function createNode(kind: ViewKind, prefix: string, processes: number | null, indent: number, line: number, role: ViewNode["role"]): ViewNode {
  return { kind, prefix, processes, indent, line, role, type: createClaim<string>(), numbers: null, words: null, children: [] };
}

function ownerOf(stack: readonly ViewNode[], indent: number): ViewNode | null {
  for (let index = stack.length - 1; index >= 0; index -= 1) {
    const node = stack[index];
    if (node !== undefined && node.indent < indent) return node;
  }
  return null;
}

function readProperty(node: ViewNode, text: string, indent: number, line: number): void {
  if (text.startsWith("type: ") && indent === node.indent + 2) {
    const type = /^type: ([\w-]{1,40})$/.exec(text);
    const known = node.kind === "KSP" ? krylovTypes : node.kind === "PC" ? preconditionerTypes : null;
    if (type?.[1] !== undefined && known?.has(type[1]) !== false) node.type.state(keepString(type[1]), line);
    return;
  }
  if (!firstLetters[node.kind].includes(text.charAt(0))) return;
  for (const { pattern, read } of readers[node.kind]) {
    const match = pattern.exec(text);
    if (match !== null) {
      read(node, match, line);
      return;
    }
  }
}

export function numberOf(node: ViewNode | null | undefined, name: string): number | null {
  return node?.numbers?.get(name)?.value ?? null;
}

export function wordOf(node: ViewNode | null | undefined, name: string): string | null {
  return node?.words?.get(name)?.value ?? null;
}

export function lineOf(node: ViewNode | null | undefined, name: string): number | null {
  return node?.numbers?.get(name)?.line ?? node?.words?.get(name)?.line ?? null;
}
