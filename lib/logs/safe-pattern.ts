import { parsePattern, PatternError, type PatternNode } from "@/lib/logs/pattern-syntax";

export { PatternError };

/** A compiled pattern with one capture group. */
export type SafePattern = {
  /** What the group captured at the leftmost match, null without a match. */
  capture(line: string): string | null;
  /** Steps taken by all calls so far, at most (length of the line + 1) x (size of the program) each. */
  readonly steps: number;
};

const programLimit = 2_000;
const patternLimit = 400;

/** Instructions: match one of a set, go two ways, note the capture's begin or end, test a place, accept. */
type Instruction =
  | { op: "set"; set: Uint8Array }
  | { op: "split"; first: number; second: number }
  | { op: "jump"; to: number }
  | { op: "begin" | "end" | "accept" }
  | { op: "assert"; what: "start" | "end" | "word" };

/**
 * Compiles a pattern that has exactly one capture group. Matching simulates all threads of a non-deterministic automaton
 * side by side (R. Cox, "Regular Expression Matching: the Virtual Machine Approach", 2009; K. Thompson, Comm. ACM
 * 11(6), 1968), so no pattern and no text can make it backtrack: time is linear in the line, memory constant. This was
 * chosen over checking patterns for the engine of the language, because harmless looking ones such as `.*.*.*=` still
 * take polynomial time there.
 *
 * Throws PatternError for syntax outside the subset, a number of groups other than one, or a pattern that is too long.
 */
export function compilePattern(source: string, { ignoreCase = false }: { ignoreCase?: boolean } = {}): SafePattern {
  if (source.length > patternLimit) throw new PatternError(`A pattern may have ${patternLimit} characters.`, patternLimit);
  const { node, captures } = parsePattern(source, ignoreCase);
  if (captures !== 1) throw new PatternError("A pattern needs exactly one group (...) around the value; use (?:...) for others.", 0);
  const program: Instruction[] = [];
  emit(program, node);
  program.push({ op: "accept" });
  const required = ignoreCase ? "" : longestLiteral(node);
  const machine = createMachine(program);
  return {
    capture: (line) => (required !== "" && !line.includes(required) ? null : machine.run(line)),
    get steps() {
      return machine.steps;
    },
  };
}

function emit(program: Instruction[], node: PatternNode): void {
  if (program.length > programLimit) throw new PatternError("The pattern is too complex.", 0);
  switch (node.kind) {
    case "set":
      program.push({ op: "set", set: node.set });
      return;
    case "assert":
      program.push({ op: "assert", what: node.what });
      return;
    case "sequence":
      for (const part of node.parts) emit(program, part);
      return;
    case "capture":
      program.push({ op: "begin" });
      emit(program, node.of);
      program.push({ op: "end" });
      return;
    case "choice":
      emitChoice(program, node.options);
      return;
    case "repeat":
      emitRepeat(program, node);
  }
}

function emitChoice(program: Instruction[], options: readonly PatternNode[]): void {
  const jumps: { op: "jump"; to: number }[] = [];
  for (const [index, option] of options.entries()) {
    if (index === options.length - 1) {
      emit(program, option);
      break;
    }
    const split = { op: "split" as const, first: program.length + 1, second: 0 };
    program.push(split);
    emit(program, option);
    const jump = { op: "jump" as const, to: 0 };
    program.push(jump);
    jumps.push(jump);
    split.second = program.length;
  }
  for (const jump of jumps) jump.to = program.length;
}

function emitRepeat(program: Instruction[], { of, min, max, greedy }: Extract<PatternNode, { kind: "repeat" }>): void {
  for (let count = 0; count < min; count += 1) emit(program, of);
  const ways = (into: number, past: number) => (greedy ? { first: into, second: past } : { first: past, second: into });
  if (max === Infinity) {
    const at = program.length;
    const split = { op: "split" as const, ...ways(at + 1, 0) };
    program.push(split);
    emit(program, of);
    program.push({ op: "jump", to: at });
    Object.assign(split, ways(at + 1, program.length));
    return;
  }
  const splits: { split: { op: "split"; first: number; second: number }; into: number }[] = [];
  for (let count = min; count < max; count += 1) {
    const into = program.length + 1;
    const split = { op: "split" as const, ...ways(into, 0) };
    program.push(split);
    splits.push({ split, into });
    emit(program, of);
  }
  for (const { split, into } of splits) Object.assign(split, ways(into, program.length));
}

/** Longest run of single characters that every match must contain; lines without it are not tried. */
function longestLiteral(node: PatternNode): string {
  let best = "";
  let run = "";
  const visit = (part: PatternNode): void => {
    if (part.kind === "sequence") part.parts.forEach(visit);
    else if (part.kind === "capture") visit(part.of);
    else if (part.kind === "set" && part.set.reduce((sum, bit) => sum + bit, 0) === 1) run += String.fromCharCode(part.set.indexOf(1));
    else if (part.kind !== "assert") run = "";
    if (run.length > best.length) best = run;
  };
  visit(node);
  return best;
}

type Threads = { at: Int32Array; begin: Int32Array; end: Int32Array; count: number };

function createThreads(size: number): Threads {
  return { at: new Int32Array(size), begin: new Int32Array(size), end: new Int32Array(size), count: 0 };
}

function isWord(line: string, position: number): boolean {
  const code = line.charCodeAt(position);
  return (code >= 48 && code <= 57) || (code >= 65 && code <= 90) || (code >= 97 && code <= 122) || code === 95;
}

function holds(what: "start" | "end" | "word", line: string, position: number): boolean {
  if (what === "start") return position === 0;
  if (what === "end") return position === line.length;
  return isWord(line, position - 1) !== isWord(line, position);
}

function createMachine(program: readonly Instruction[]) {
  const size = program.length;
  const visited = new Int32Array(size).fill(-1);
  let now = createThreads(size);
  let next = createThreads(size);
  // Depth-first walk over jumps and splits; each instruction enters once a position, so this never overflows.
  const stack = createThreads(2 * size + 2);
  let steps = 0;
  let mark = 0;

  function push(at: number, begin: number, end: number): void {
    stack.at[stack.count] = at;
    stack.begin[stack.count] = begin;
    stack.end[stack.count] = end;
    stack.count += 1;
  }

  function follow(into: Threads, from: number, fromBegin: number, fromEnd: number, line: string, position: number): void {
    push(from, fromBegin, fromEnd);
    while (stack.count > 0) {
      stack.count -= 1;
      const at = stack.at[stack.count] ?? 0;
      const begin = stack.begin[stack.count] ?? -1;
      const end = stack.end[stack.count] ?? -1;
      if (visited[at] === mark) continue;
      visited[at] = mark;
      steps += 1;
      const instruction = program[at];
      if (instruction === undefined) continue;
      if (instruction.op === "jump") push(instruction.to, begin, end);
      else if (instruction.op === "split") {
        push(instruction.second, begin, end);
        push(instruction.first, begin, end);
      } else if (instruction.op === "begin") push(at + 1, position, end);
      else if (instruction.op === "end") push(at + 1, begin, position);
      else if (instruction.op === "assert") {
        if (holds(instruction.what, line, position)) push(at + 1, begin, end);
      } else {
        into.at[into.count] = at;
        into.begin[into.count] = begin;
        into.end[into.count] = end;
        into.count += 1;
      }
    }
  }

  function run(line: string): string | null {
    let found: string | null = null;
    let matched = false;
    now.count = 0;
    for (let position = 0; position <= line.length; position += 1) {
      mark += 1;
      // Threads of earlier starts come first: the leftmost match wins.
      const kept = now.count;
      next.count = 0;
      if (position > 0) {
        const code = line.charCodeAt(position - 1);
        for (let index = 0; index < kept; index += 1) {
          const at = now.at[index] ?? 0;
          const instruction = program[at];
          if (instruction?.op === "set" && code < 256 && instruction.set[code] === 1) {
            follow(next, at + 1, now.begin[index] ?? -1, now.end[index] ?? -1, line, position);
          }
        }
      }
      if (!matched) follow(next, 0, -1, -1, line, position);
      for (let index = 0; index < next.count; index += 1) {
        if (program[next.at[index] ?? 0]?.op !== "accept") continue;
        matched = true;
        const begin = next.begin[index] ?? -1;
        const end = next.end[index] ?? -1;
        found = begin >= 0 && end >= begin ? line.slice(begin, end) : null;
        // Threads of lower priority are cut off.
        next.count = index;
      }
      [now, next] = [next, now];
      if (matched && now.count === 0) break;
    }
    if (mark > 1_000_000_000) {
      visited.fill(-1);
      mark = 0;
    }
    return found;
  }

  return {
    run,
    get steps() {
      return steps;
    },
  };
}
