import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { createMappedLogReader } from "@/lib/logs/mapped-log-reader";
import { logMappingSchema } from "@/lib/logs/mapping";
import { parsedLogSchema } from "@/lib/logs/parsed-log";
import { compilePattern } from "@/lib/logs/safe-pattern";

function read(mapping: unknown, text: string, options = {}) {
  const reader = createMappedLogReader(logMappingSchema.parse(mapping), options);
  reader.push(Buffer.from(text, "latin1"));
  const result = reader.finish();
  parsedLogSchema.parse(result);
  return result;
}

const log = `solver start
it,res,true
0,1.0,1.0
1,2.5e-3,4e-3
2,1.0D-09,3.0E-8
iterations: 2 on 16 ranks
solve took 1500 ms, set-up 250 ms
peak 2048 MiB
STATUS ok
`;

const mapping = {
  name: "in-house",
  quantities: {
    iterations: { by: "pattern", pattern: String.raw`^iterations: (\d+)` },
    processes: { by: "pattern", pattern: String.raw`on (\d+) ranks` },
    solveSeconds: { by: "pattern", pattern: String.raw`solve took (\S+) ms`, scale: 0.001 },
    peakMemoryGiB: { by: "column", delimiter: "whitespace", index: 2, contains: "peak ", scale: 1 / 1024 },
    residual: { by: "column", delimiter: "comma", index: 2 },
    trueResidual: { by: "column", delimiter: "comma", index: 3 },
  },
  outcome: { converged: "STATUS ok", diverged: "STATUS blown" },
};

it("picks quantities by pattern and by column, with their lines", () => {
  expect(read(mapping, log)).toMatchObject({
    iterations: 2, processes: 16, solveSeconds: 1.5, peakMemoryGiB: 2, outcome: "converged", setupSeconds: null,
    lines: { iterations: 6, processes: 6, solveSeconds: 7, peakMemoryGiB: 8, outcome: 9, residualHistory: 3 },
    residualHistory: [
      { iteration: 0, monitored: 1, true: 1, trueRelative: null },
      { iteration: 1, monitored: 2.5e-3, true: 4e-3, trueRelative: null },
      { iteration: 2, monitored: 1e-9, true: 3e-8, trueRelative: null },
    ],
  });
});

it("leaves a quantity open that is stated differently, unless first or last is chosen", () => {
  const quantity = (take: string) => ({ name: "x", quantities: { iterations: { by: "pattern", pattern: String.raw`n=(\d+)`, take } } });
  const text = "n=3\nn=5\n";
  expect(read(quantity("only"), text).iterations).toBeNull();
  expect(read(quantity("first"), text).iterations).toBe(3);
  expect(read(quantity("last"), text).iterations).toBe(5);
});

it("takes no number that does not fit the quantity", () => {
  const quantities = { iterations: { by: "pattern", pattern: "n=(.*)" } };
  for (const value of ["1.5", "-3", "1e999", "nan", "0x10", "", "3,000"]) {
    expect(read({ name: "x", quantities }, `n=${value}\n`).iterations).toBeNull();
  }
});

it("stops when the step budget is used up and reports nothing", () => {
  const quantities = { iterations: { by: "pattern", pattern: String.raw`(?:a|aa)*b(\d)` } };
  const result = read({ name: "x", quantities }, `${"a".repeat(4_000)}b1\n`.repeat(50), { stepBudget: 100_000 });
  expect(result.iterations).toBeNull();
  expect(result.problems.some(({ severity }) => severity === "error")).toBe(true);
});

it("refuses NUL bytes like the other reader", () => {
  expect(read(mapping, `${log}\0`)).toMatchObject({ iterations: null, problems: [{ severity: "error", line: 10 }] });
});

describe("patterns outside the linear subset are refused in words", () => {
  it.each([String.raw`(a)\1`, "(?=a)(b)", "(?<!a)(b)", "(?<n>a)", "a", "(a)(b)", "(a", "a)", "[z-a](b)", "*(a)", "(a)**", "(a){9999}", "(a){3,1}", "[a(b)", String.raw`(a)\p`, `(${"a".repeat(500)})`, "((((a{200}){200}))"])("%s", (pattern) => {
    const parsed = logMappingSchema.safeParse({ name: "x", quantities: { iterations: { by: "pattern", pattern } } });
    expect(parsed.success).toBe(false);
  });
});

/** Patterns on which back-tracking engines take exponential or high polynomial time (common knowledge, no source). */
it.each(["(?:a+)+(b)", "(?:a|a)*(b)", "(?:a|aa)+(b)", ".*.*.*.*.*(=)", "(?:a?){100}(?:a){100}(b)"])("%s is matched in linear time", (pattern) => {
  const short = compilePattern(pattern);
  const long = compilePattern(pattern);
  expect(short.capture(`${"a".repeat(1_000)}!b=`.slice(0, 1_001))).toBeNull();
  expect(long.capture(`${"a".repeat(4_000)}!b=`.slice(0, 4_001))).toBeNull();
  expect(long.steps).toBeLessThanOrEqual(4.5 * short.steps);
});

it("captures what the language's own engine captures", () => {
  // Oracle: the RegExp of the JavaScript engine, on patterns where both are defined.
  const atom = fc.constantFrom("a", "b", "\\d", "[ab]", "[^a]", ".", "(?:ab|b)", "\\w", "\\s", "a|b");
  const quantifier = fc.constantFrom("", "", "*", "+", "?", "*?", "+?", "{1,2}", "{2}", "??");
  const piece = fc.tuple(atom, quantifier).map(([text, times]) => (text === "a|b" ? `(?:a|b)${times}` : `${text}${times}`));
  const pieces = (maxLength: number) => fc.array(piece, { maxLength }).map((parts) => parts.join(""));
  const pattern = fc.tuple(fc.constantFrom("", "^", "\\b"), pieces(3), pieces(3), pieces(2), fc.constantFrom("", "$", "\\b")).map(([start, before, inside, after, end]) => `${start}${before}(${inside})${after}${end}`);
  fc.assert(
    fc.property(pattern, fc.string({ unit: fc.constantFrom("a", "b", "1", " ", "x"), maxLength: 12 }), (source, line) => {
      expect(compilePattern(source).capture(line)).toBe(new RegExp(source, "s").exec(line)?.[1] ?? null);
    }),
    { numRuns: 5_000, seed: 7 },
  );
});
