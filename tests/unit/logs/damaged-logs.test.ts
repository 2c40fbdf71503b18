import { describe, expect, it } from "vitest";
import { parsedLogSchema, type ParsedLog } from "@/lib/logs/parsed-log";
import { harmful, harmless } from "./damage";
import { logNames, logText, readText, singleValues } from "./read-log";

const genuine = new Map(logNames.map((name) => [name, { text: logText(name), result: readText(logText(name)) }]));

/**
 * The true residual is stated twice, by the last monitor line and recomputed by the program; either is right, and they
 * differ by round-off (by 1 % in the direct solves). An error's text may lose some of its parts.
 */
function isSame(field: (typeof singleValues)[number], result: ParsedLog, right: ParsedLog): boolean {
  if (field === "reason" && right.reason?.includes(": ") === true) return result.outcome === right.outcome;
  if (field !== "trueRelativeResidual") return Object.is(result[field], right[field]);
  return right[field] !== null && Math.abs((result[field] ?? 0) / right[field] - 1) < 0.02;
}

/** Values of the result that are neither null nor those of one of the accepted readings. */
function wrongValues(result: ParsedLog, accepted: readonly ParsedLog[]): string[] {
  const wrong: string[] = singleValues.filter((field) => result[field] !== null && !accepted.some((other) => isSame(field, result, other)));
  const points = new Set(accepted.flatMap(({ residualHistory }) => residualHistory.map((point) => JSON.stringify(point))));
  if (result.residualHistory.some((point) => !points.has(JSON.stringify(point)))) wrong.push("residualHistory");
  return wrong;
}

it("is a corpus of at least forty kinds of damage", () => {
  expect(harmless.length + harmful.length).toBeGreaterThanOrEqual(40);
});

describe.each(logNames)("%s", (name) => {
  const { text, result: right } = genuine.get(name) ?? { text: "", result: readText("") };

  it.each(harmless)("reads the same values with $name", ({ apply }) => {
    const result = readText(apply(text));
    for (const field of singleValues) expect([field, result[field]]).toEqual([field, right[field]]);
    expect(result.residualHistory).toEqual(right.residualHistory);
    expect(result.unusedOptions).toEqual(right.unusedOptions);
    expect(result.solves).toBe(right.solves);
  });

  it.each(harmful)("is right or silent with $name", ({ apply }) => {
    const result = readText(apply(text));
    parsedLogSchema.parse(result);
    expect(wrongValues(result, [right])).toEqual([]);
  });

  it("is right or silent cut at any of 150 places", () => {
    for (let place = 1; place <= 150; place += 1) {
      const result = readText(text.slice(0, Math.floor((text.length * place) / 151)));
      expect(wrongValues(result, [right])).toEqual([]);
    }
  });

  it("is right or silent cut within each of the telling lines", () => {
    const telling = /Linear solve|True relative|INFOG\(29\)|^KSPSolve|^PCSetUp|Object: \d|iterations=|Option left/gm;
    for (const match of text.matchAll(telling)) {
      const end = text.indexOf("\n", match.index);
      for (let at = match.index; at <= end; at += 3) expect(wrongValues(readText(text.slice(0, at)), [right])).toEqual([]);
    }
  });

  it("refuses NUL bytes with their line", () => {
    const at = Math.floor(text.length / 3);
    const result = readText(`${text.slice(0, at)}\0${text.slice(at)}`);
    expect(singleValues.filter((field) => result[field] !== null)).toEqual([]);
    expect(result.problems).toEqual([{ line: text.slice(0, at).split("\n").length, text: expect.stringContaining("NUL"), severity: "error" }]);
  });
});

const pairs = logNames.flatMap((first, index) => logNames.slice(index + 1).map((second) => ({ first, second })));

describe.each(pairs)("$first and $second", ({ first, second }) => {
  const a = genuine.get(first)?.text ?? "";
  const b = genuine.get(second)?.text ?? "";
  const right = [readText(a), readText(b)];

  it("never mix when interleaved line by line", () => {
    const other = b.split("\n");
    const mixed = a.split("\n").map((line, index) => `${line}\n${other[index] ?? ""}`).join("\n");
    const result = readText(mixed);
    expect(Math.min(...right.map((reading) => wrongValues(result, [reading]).length))).toBe(0);
  });

  it("one after the other: the last complete solve is reported and both are counted", () => {
    const result = readText(a + b);
    const [left, latter] = right;
    const expected = latter?.reason?.startsWith("Object") === true ? left : latter;
    for (const field of singleValues) expect([field, result[field]]).toEqual([field, expected?.[field]]);
    expect(result.solves).toBe((left?.solves ?? 0) + (latter?.solves ?? 0));
  });

  it("the second cut short: what is reported belongs to one of them", () => {
    for (const share of [0.05, 0.2, 0.4, 0.6, 0.8]) {
      const result = readText(a + b.slice(0, Math.floor(share * b.length)));
      expect(Math.min(...right.map((reading) => wrongValues(result, [reading]).length))).toBe(0);
    }
  });
});
