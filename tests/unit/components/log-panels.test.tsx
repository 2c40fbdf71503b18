import { spawnSync } from "node:child_process";
import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { batchSnippets } from "@/components/logs/batch-snippets";
import { correctionsOf, formOfLog } from "@/components/logs/log-form-values";
import { LogDrop } from "@/components/logs/log-drop";
import { LogReading } from "@/components/logs/log-reading";
import { emptyDraft, emptyRow, tryMapping } from "@/components/logs/mapping-draft";
import { MappingEditor } from "@/components/logs/mapping-editor";
import { relativeHistory, understoodValues } from "@/components/logs/understood-values";
import { logQuery } from "@/lib/api/contract/logs";
import { createLogReader } from "@/lib/logs/log-reader";
import { emptyParsedLog } from "@/lib/logs/parsed-log";
import { diagnoseRun } from "@/lib/runs/diagnosis/diagnose-run";
import { runReportSchema } from "@/lib/runs/run";
import { emptyRunForm, fromRunForm } from "@/lib/runs/run-form";

function parse(name: string) {
  const reader = createLogReader();
  reader.push(readFileSync(fileURLToPath(new URL(`../../reference/logs/${name}`, import.meta.url))));
  return reader.finish();
}

// Figures as they stand in the text of the log, read by eye (see tests/unit/logs/genuine-logs).
const minres = parse("s2_minres_tet8-RT1_cb1e4_np1.log");

describe("what was understood of a log", () => {
  it("names each value with the line it came from", () => {
    expect(understoodValues(minres).find(({ field }) => field === "iterations")).toEqual({ field: "iterations", label: "Iterations", value: "39", line: 41 });
  });

  it("has neither a value nor a line where the log is silent", () => {
    expect(understoodValues(emptyParsedLog()).filter(({ value, line }) => value !== null || line !== null)).toEqual([]);
  });

  it("is drawn relative to the first residual", () => {
    const history = relativeHistory(minres);
    expect(history[0]).toMatchObject({ iteration: 0, monitored: 1, true: 1 });
    // 5.610617497435e-08 / 8.391406890924e+00, and ||r||/||b|| as printed.
    expect(history.at(-1)?.monitored).toBeCloseTo(6.6862e-9, 12);
    expect(history.at(-1)?.true).toBeCloseTo(1.011716880541e-7, 18);
  });

  it("is not drawn where nothing can be divided by the first residual", () => {
    const zero = { ...emptyParsedLog(), residualHistory: [{ iteration: 0, monitored: 0, true: null, trueRelative: null }] };
    expect(relativeHistory(zero)).toEqual([]);
  });
});

describe("the screen of a log", () => {
  it("shows values, the text of their lines, doubts, and findings with what to try next", () => {
    const parsed = { ...minres, unusedOptions: ["-pc_typo"], problems: [{ line: 7, text: "Something is odd.", severity: "warning" as const }] };
    const findings = diagnoseRun({ run: { outcome: "converged", strategy: "schur-diag-direct" }, parsed, limits: {}, otherRuns: [] });
    const html = renderToStaticMarkup(<LogReading title="night.log" read={{ parsed, findings }} lineTexts={{ 41: "Linear solve converged" }} />);
    for (const text of ["39", "line 41", "Linear solve converged", "Line 7: Something is odd.", "-pc_typo", "Try next:", "The log does not say"]) expect(html).toContain(text);
  });

  it("offers dropping, choosing and pasting", () => {
    const html = renderToStaticMarkup(<LogDrop busy={false} onLog={() => undefined} />);
    for (const text of ["Drop a log", "Choose a file", "Paste text", 'type="file"']) expect(html).toContain(text);
  });
});

describe("the form that a log fills", () => {
  it("holds what the log says and leaves the rest blank", () => {
    const form = formOfLog(minres, emptyRunForm);
    expect(form).toMatchObject({ strategy: "schur-diag-direct", outcome: "converged", iterations: "39", setupSeconds: "0.042144", solveSeconds: "0.10622", cores: "1", monitoredNorm: "preconditioned" });
    expect(formOfLog(emptyParsedLog(), emptyRunForm)).toEqual(emptyRunForm);
  });

  it("sends corrections that the call understands: changed, taken back, and kept", () => {
    const report = runReportSchema.parse(fromRunForm({ ...formOfLog(minres, emptyRunForm), setupSeconds: "0.5", solveSeconds: "", note: "looked over" }));
    const query = logQuery.parse(Object.fromEntries(correctionsOf(report)));
    expect(query).toMatchObject({ strategy: "schur-diag-direct", iterations: 39, setupSeconds: 0.5, solveSeconds: null, note: "looked over" });
  });
});

describe("a log format in the making", () => {
  const draft = { ...emptyDraft, name: "House solver", converged: "all good", rows: [{ ...emptyRow("iterations"), pattern: "took (\\d+) steps" }] };

  it("is tried on the log as it is typed", () => {
    const tried = tryMapping(draft, "took 12 steps\ntook 17 steps\nall good");
    expect("parsed" in tried ? tried.parsed : tried).toMatchObject({ iterations: 17, outcome: "converged", lines: { iterations: 2 } });
  });

  it("reads a column with its unit", () => {
    const row = { ...emptyRow("solveSeconds"), by: "column" as const, index: "3", contains: "solve", scale: "0.001" };
    const tried = tryMapping({ ...draft, rows: [row] }, "solve took 2500 ms\n");
    expect("parsed" in tried ? tried.parsed.solveSeconds : tried).toBe(2.5);
  });

  it.each([
    ["no name", { ...draft, name: "" }, "name"],
    ["an empty pattern", { ...draft, rows: [emptyRow("iterations")] }, "quantities.iterations.pattern"],
    ["a pattern that could run away", { ...draft, rows: [{ ...emptyRow("iterations"), pattern: "(a+)\\1" }] }, "quantities.iterations.pattern"],
    ["a scale that is no number", { ...draft, rows: [{ ...emptyRow("iterations"), pattern: "(\\d+)", scale: "many" }] }, "quantities.iterations.scale"],
  ])("with %s says where", (_name, faulty, path) => {
    const tried = tryMapping(faulty, "");
    expect("errors" in tried ? tried.errors.map((error) => error.path) : []).toContain(path);
  });

  it("shows what it understands of the log", () => {
    const html = renderToStaticMarkup(<MappingEditor sample="took 17 steps" saving={false} refusal={null} onSave={() => undefined} onCancel={() => undefined} />);
    expect(html).toContain("Save the format and read the log");
  });
});

describe("the snippets for a job script", () => {
  const snippets = batchSnippets("https://advice.example.org", 12);

  it.each(Object.entries(snippets))("%s has nothing that shellcheck objects to, as POSIX sh", (_name, text) => {
    const checked = spawnSync("shellcheck", ["--shell=sh", "-"], { input: text, encoding: "utf8" });
    if (checked.error) throw new Error("This test needs shellcheck: apt-get install shellcheck.", { cause: checked.error });
    expect(checked.stdout).toBe("");
  });

  it("name the case, the job as the key of the call, and keep the team's key out of the command line", () => {
    for (const text of Object.values(snippets)) {
      expect(text).toContain("https://advice.example.org/api/v1/cases/12/");
      expect(text).toContain("Idempotency-Key: job-${SLURM_JOB_ID:-");
      expect(text).not.toMatch(/curl[^|]*SADDLEMARK_KEY/);
    }
  });

  it("send a run that the API accepts", () => {
    const json = /run='(.*)'/.exec(snippets.json)?.[1] ?? "";
    expect(runReportSchema.parse(JSON.parse(json))).toMatchObject({ outcome: "converged" });
  });
});
