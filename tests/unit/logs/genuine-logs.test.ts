import { describe, expect, it } from "vitest";
import { parsedLogSchema } from "@/lib/logs/parsed-log";
import { genuineLogs } from "./genuine-logs";
import { logNames, logText, readText } from "./read-log";

/** The record keeps six significant digits. */
function sameToSixDigits(actual: number | null | undefined, recorded: number): void {
  expect(Number(actual?.toPrecision(5))).toBe(Number(recorded.toPrecision(5)));
}

it("has an expectation for every log", () => {
  expect(genuineLogs.map(({ file }) => file).sort()).toEqual(logNames);
});

describe.each(genuineLogs)("$file", ({ file, record, parsed, lines, historyPoints }) => {
  const text = logText(file);
  const result = readText(text);

  it("agrees with the figures recorded by the same run", () => {
    if (record.iterations !== undefined) expect(result.iterations).toBe(record.iterations);
    if (record.trueResidual !== undefined) sameToSixDigits(result.trueRelativeResidual, record.trueResidual);
    if (record.ranks !== undefined) expect(result.processes).toBe(record.ranks);
    if (record.unknowns !== undefined && result.systemUnknowns !== null) expect(result.systemUnknowns).toBe(record.unknowns);
    if (record.entries !== undefined) expect(result.factorEntries).toBe(record.entries);
    if (record.estimate !== undefined) expect(result.mumps?.estimatedEntries).toBe(record.estimate);
    if (record.flops !== undefined) sameToSixDigits(result.mumps?.factorFlops, record.flops);
    if (record.megabytes !== undefined) expect(result.mumps?.memoryMegabytesSum).toBe(record.megabytes);
    expect(Object.keys(record).length === 0 || result.linesRead > 0).toBe(true);
  });

  it("reads every value as it stands in the text", () => {
    expect(result).toMatchObject(parsed);
    expect(result.residualHistory).toHaveLength(historyPoints);
    expect(result.libraryVersion).toBe("3.18.5");
  });

  it("names the line of every value", () => {
    expect(result.lines).toMatchObject(lines);
    const printed = text.split("\n");
    for (const line of Object.values(result.lines)) expect(printed[line - 1]).toBeTruthy();
  });

  it("fits the published shape", () => {
    expect(parsedLogSchema.parse(result)).toEqual(result);
  });

  it("gives the same whatever the chunks", () => {
    for (const chunkBytes of [1, 7, 1_000, 1_000_000]) expect(readText(text, {}, chunkBytes)).toEqual(result);
  });
});

it("keeps the residuals as printed", () => {
  const { residualHistory } = readText(logText("s2_minres_tet8-RT1_cb1e4_np2.log"));
  expect(residualHistory[0]).toEqual({ iteration: 0, monitored: 8.391406890925, true: 0.2041241452319, trueRelative: 1 });
  expect(residualHistory.at(-1)).toEqual({ iteration: 39, monitored: 5.610617411166e-8, true: 2.06513135533e-8, trueRelative: 1.011703614476e-7 });
});
