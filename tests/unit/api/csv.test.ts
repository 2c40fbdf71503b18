import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { headerErrors, parseImportRow, rowFromCells } from "@/lib/runs/import-row";
import { csvLine } from "@/lib/shared/csv";
import { CsvReader } from "@/lib/shared/csv-reader";

function readAll(text: string, pieceLength = text.length || 1): string[][] {
  const reader = new CsvReader();
  const records = [];
  for (let start = 0; start < text.length; start += pieceLength) records.push(...reader.push(text.slice(start, start + pieceLength)));
  return [...records, ...reader.end()].map(({ cells }) => cells);
}

// RFC 4180, section 2.
describe("CsvReader", () => {
  it.each([
    ["aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n", [["aaa", "bbb", "ccc"], ["zzz", "yyy", "xxx"]]],
    ["aaa,bbb\r\nzzz,yyy", [["aaa", "bbb"], ["zzz", "yyy"]]],
    ['"aaa","b\r\nbb","ccc"\r\nz,y,x', [["aaa", "b\r\nbb", "ccc"], ["z", "y", "x"]]],
    ['"aaa","b""bb","ccc"', [["aaa", 'b"bb', "ccc"]]],
    ["a,,b\n,\n", [["a", "", "b"], ["", ""]]],
    ['a\rb\n\n\r\n""\n', [["a"], ["b"], [""]]],
    ["\ufeffa,b\n", [["a", "b"]]],
    ["", []],
  ])("reads %j", (text, expected) => {
    expect(readAll(text)).toEqual(expected);
    expect(readAll(text, 1)).toEqual(expected);
  });

  it.each([
    ['a"b', "Line 1: a quote stands inside"],
    ['ok\n"a"b', "Line 2: text stands after"],
    ['ok\n\n"never\nclosed', "Line 3: a quoted cell is never closed"],
    ["x".repeat(2 ** 20 + 1), "Line 1: the record is longer"],
  ])("refuses %#, naming the line", (text, message) => {
    expect(() => readAll(text)).toThrow(message);
  });

  it("reads back whatever csvLine writes, in pieces of any length", () => {
    const cells = fc.array(fc.string({ unit: "grapheme" }).filter((text) => !/^[=+\-@\t\r'\ufeff]/.test(text)), { minLength: 2, maxLength: 5 });
    fc.assert(
      fc.property(fc.array(cells, { minLength: 1, maxLength: 5 }), fc.integer({ min: 1, max: 7 }), (rows, pieceLength) => {
        expect(readAll(rows.map((row) => csvLine(row)).join("\r\n"), pieceLength)).toEqual(rows);
      }),
      { numRuns: 300, seed: 20261201 },
    );
  });
});

describe("csvLine", () => {
  // Formula injection: OWASP, "CSV Injection".
  it.each(["=1+1", "+1", "-1", "@SUM(A1)", "\tx", "\rx"])("keeps %j from running as a formula", (text) => {
    expect(csvLine([text]).replace(/^"/, "")).toMatch(/^'/);
  });
  it("leaves numbers as they are", () => {
    expect(csvLine([-1.5, 4e-7, null, true])).toBe("-1.5,4e-7,,true");
  });
});

describe("a row of an import", () => {
  it("reads numbers, yes or no and JSON from cells and leaves empty cells out", () => {
    const header = ["caseId", "strategy", "outcome", "solveSeconds", "followedAdvice", "parameters", "note"];
    expect(rowFromCells(header, ["12", "bddc", "converged", "1.5e1", "true", '{"gamma":0.4}', " "])).toEqual({
      caseId: "12", strategy: "bddc", outcome: "converged", solveSeconds: 15, followedAdvice: true, parameters: { gamma: 0.4 },
    });
  });

  it.each(["0x10", "1,5", "Infinity", "NaN", "1e", "--1"])("leaves %j in a number's cell as text, to be refused there", (cell) => {
    const result = parseImportRow(rowFromCells(["caseId", "strategy", "outcome", "solveSeconds"], ["12", "bddc", "converged", cell]));
    expect(result).toMatchObject({ errors: [{ path: "solveSeconds" }] });
  });

  it("belongs to a case by UUID or number, or to a questionnaire, and to one of them only", () => {
    const run = { strategy: "bddc", outcome: "converged" };
    expect(parseImportRow({ ...run, caseId: 12 })).toMatchObject({ row: { target: { kind: "case", ref: "12" } } });
    expect(parseImportRow({ ...run, caseId: "12" })).toMatchObject({ row: { target: { kind: "case", ref: "12" } } });
    expect(parseImportRow({ ...run, caseId: true })).toMatchObject({ errors: [{ path: "caseId" }] });
    expect(parseImportRow(run)).toMatchObject({ errors: [{ path: "caseId" }] });
    expect(parseImportRow({ ...run, questionnaire: { degree: 0 } })).toMatchObject({ errors: expect.arrayContaining([expect.objectContaining({ path: "questionnaire.degree" })]) });
  });

  it.each([[["strategy", "outcome", "colour"]], [["strategy", "strategy"]]])("the header %j is refused", (header) => {
    expect(headerErrors(header)).toHaveLength(1);
  });
});
