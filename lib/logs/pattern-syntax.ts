/**
 * Syntax of the patterns users may write: the regular part of regular expressions, which can be matched in linear time.
 * Literals, `.`, classes, `\d \w \s` and their complements, `^`, `$`, `\b`, groups, `|`, and the quantifiers
 * `* + ? {m} {m,} {m,n}`, each with `?` for the shortest match. Back references and look-around are refused.
 */
export type PatternNode =
  | { kind: "set"; set: Uint8Array }
  | { kind: "assert"; what: "start" | "end" | "word" }
  | { kind: "sequence"; parts: PatternNode[] }
  | { kind: "choice"; options: PatternNode[] }
  | { kind: "repeat"; of: PatternNode; min: number; max: number; greedy: boolean }
  | { kind: "capture"; of: PatternNode };

export class PatternError extends Error {
  /** 0-based position in the pattern. */
  readonly position: number;
  constructor(message: string, position: number) {
    super(message);
    this.name = "PatternError";
    this.position = position;
  }
}

const maximumRepeat = 200;
const escapes: Record<string, number> = { t: 9, n: 10, r: 13, f: 12, v: 11 };

function emptySet(): Uint8Array {
  return new Uint8Array(256);
}

function fill(set: Uint8Array, from: number, to: number): void {
  for (let code = from; code <= Math.min(to, 255); code += 1) set[code] = 1;
}

function complement(set: Uint8Array): Uint8Array {
  return set.map((bit) => 1 - bit);
}

function classOf(letter: string): Uint8Array | null {
  const set = emptySet();
  const lower = letter.toLowerCase();
  if (lower === "d") fill(set, 48, 57);
  else if (lower === "w") {
    fill(set, 48, 57);
    fill(set, 65, 90);
    fill(set, 97, 122);
    set[95] = 1;
  } else if (lower === "s") {
    fill(set, 9, 13);
    set[32] = 1;
    set[160] = 1;
  } else return null;
  return letter === lower ? set : complement(set);
}

/** Parses a pattern; throws PatternError that says what is not allowed and where. */
export function parsePattern(source: string, ignoreCase: boolean): { node: PatternNode; captures: number } {
  let at = 0;
  let depth = 0;
  let captures = 0;

  const fail = (message: string, position = at): never => {
    throw new PatternError(message, position);
  };

  function literal(code: number): PatternNode {
    if (code > 255) return fail("Only characters of Western European alphabets can be matched.");
    const set = emptySet();
    set[code] = 1;
    if (ignoreCase) foldCase(set);
    return { kind: "set", set };
  }

  function parseChoice(): PatternNode {
    depth += 1;
    if (depth > 30) fail("Groups are nested too deeply.");
    const options = [parseSequence()];
    while (source[at] === "|") {
      at += 1;
      options.push(parseSequence());
    }
    depth -= 1;
    const [only] = options;
    return options.length === 1 && only !== undefined ? only : { kind: "choice", options };
  }

  function parseSequence(): PatternNode {
    const parts: PatternNode[] = [];
    while (at < source.length && source[at] !== "|" && source[at] !== ")") parts.push(parseQuantified());
    return { kind: "sequence", parts };
  }

  function parseQuantified(): PatternNode {
    const node = parseAtom();
    const begin = at;
    const range = parseRange();
    if (range === null) return node;
    if (node.kind === "assert") return fail("A quantifier needs something to repeat.", begin);
    if (range.min > range.max) fail("The range of a quantifier is upside down.", begin);
    if (range.min > maximumRepeat || (range.max !== Infinity && range.max > maximumRepeat)) {
      fail(`Nothing may be repeated more than ${maximumRepeat} times by a count.`, begin);
    }
    const greedy = source[at] !== "?";
    if (!greedy) at += 1;
    if (parseRange() !== null) fail("Two quantifiers follow each other.", begin);
    return { kind: "repeat", of: node, greedy, ...range };
  }

  function parseRange(): { min: number; max: number } | null {
    const sign = source[at];
    if (sign === "*" || sign === "+" || sign === "?") {
      at += 1;
      return { min: sign === "+" ? 1 : 0, max: sign === "?" ? 1 : Infinity };
    }
    const match = sign === "{" ? /^\{(\d{1,4})(,(\d{0,4}))?\}/.exec(source.slice(at, at + 14)) : null;
    if (match === null) return null;
    at += match[0].length;
    const min = Number(match[1]);
    if (match[2] === undefined) return { min, max: min };
    return { min, max: match[3] === "" ? Infinity : Number(match[3]) };
  }

  function parseAtom(): PatternNode {
    const sign = source[at] ?? "";
    at += 1;
    if (sign === "(") return parseGroup();
    if (sign === "[") return parseClass();
    if (sign === "\\") return parseEscape();
    if (sign === "^") return { kind: "assert", what: "start" };
    if (sign === "$") return { kind: "assert", what: "end" };
    if (sign === ".") return { kind: "set", set: emptySet().fill(1) };
    if (sign === "*" || sign === "+" || sign === "?") return fail("A quantifier needs something to repeat.", at - 1);
    return literal(sign.charCodeAt(0));
  }

  function parseGroup(): PatternNode {
    const begin = at - 1;
    let capturing = true;
    if (source[at] === "?") {
      if (source[at + 1] !== ":") return fail("Look-around and named groups are not supported; use (...) or (?:...).", begin);
      at += 2;
      capturing = false;
    }
    const inner = parseChoice();
    if (source[at] !== ")") return fail("A group is not closed.", begin);
    at += 1;
    if (!capturing) return inner;
    captures += 1;
    return { kind: "capture", of: inner };
  }

  function parseEscape(): PatternNode {
    const sign = source[at];
    if (sign === undefined) return fail("The pattern ends with a backslash.", at - 1);
    at += 1;
    if (sign === "b") return { kind: "assert", what: "word" };
    if (/[1-9]/.test(sign)) return fail("Back references are not supported.", at - 2);
    const set = classOf(sign);
    if (set !== null) return { kind: "set", set };
    const control = escapes[sign];
    if (control !== undefined) return literal(control);
    if (/[A-Za-z0]/.test(sign)) return fail(`\\${sign} is not supported.`, at - 2);
    return literal(sign.charCodeAt(0));
  }

  function parseClassMember(): Uint8Array | number {
    const sign = source[at] ?? "";
    at += 1;
    if (sign !== "\\") return sign.charCodeAt(0);
    const escaped = source[at] ?? "";
    at += 1;
    return classOf(escaped) ?? escapes[escaped] ?? escaped.charCodeAt(0);
  }

  function parseClass(): PatternNode {
    const begin = at - 1;
    const negated = source[at] === "^";
    if (negated) at += 1;
    const set = emptySet();
    while (source[at] !== "]") {
      if (at >= source.length) return fail("A class is not closed.", begin);
      const low = parseClassMember();
      if (typeof low !== "number") {
        low.forEach((bit, code) => bit === 1 && fill(set, code, code));
        continue;
      }
      let high: Uint8Array | number = low;
      if (source[at] === "-" && source[at + 1] !== "]" && at + 1 < source.length) {
        at += 1;
        high = parseClassMember();
      }
      if (typeof high !== "number" || Number.isNaN(high) || high < low) return fail("A range in a class is upside down.", begin);
      fill(set, low, high);
    }
    at += 1;
    if (ignoreCase) foldCase(set);
    return { kind: "set", set: negated ? complement(set) : set };
  }

  const node = parseChoice();
  if (at < source.length) fail("A closing bracket has no opening one.");
  return { node, captures };
}

function foldCase(set: Uint8Array): void {
  for (let code = 65; code <= 90; code += 1) {
    if (set[code] === 1 || set[code + 32] === 1) {
      set[code] = 1;
      set[code + 32] = 1;
    }
  }
}
