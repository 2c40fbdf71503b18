import { describe, expect, it } from "vitest";
import { strategies } from "@/lib/strategies";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { optionsContext } from "../../../support/petsc/options-context";

const contexts = [
  { name: "the default case", context: optionsContext() },
  { name: "degree 2", context: optionsContext({ degree: 2, discretisation: "rt-hex" }) },
  { name: "contrast 1e6 with a pressure boundary", context: optionsContext({ contrast: 1e6, boundary: "pressure-somewhere" }) },
  { name: "tolerance 1e-12", context: optionsContext({ tolerance: 1e-12 }) },
];
const table = contexts.flatMap(({ name, context }) => strategyIds.map((id) => ({ id, name, context })));

function textOf(id: (typeof strategyIds)[number], context = optionsContext()): string {
  const file = strategies[id].options(context);
  return file.kind === "petsc" ? file.text : "";
}

describe("every strategy's options", () => {
  it.each(table)("$id, $name: a commented PETSc file without dates, or a reason", ({ id, context }) => {
    const file = strategies[id].options(context);
    if (file.kind === "recipe-only") {
      expect(file.reason.length).toBeGreaterThan(40);
      return;
    }
    const lines = file.text.split("\n");
    expect(lines[0]).toMatch(/^# Saddlemark: /);
    for (const line of lines) expect(line).toMatch(/^(#.*|-[a-z][A-Za-z0-9_]*( [^ #]+)?|)$/);
    const names = lines.filter((line) => line.startsWith("-")).map((line) => line.split(" ")[0]);
    expect(new Set(names).size).toBe(names.length);
    lines.forEach((line, index) => line.startsWith("-") && expect(lines[index - 1], `${line} is explained`).toMatch(/^#/));
    expect(file.text).not.toMatch(/\b20\d\d\b|NaN|Infinity|undefined/);
    expect(file.callingLines ?? "").not.toMatch(/NaN|Infinity|undefined/);
  });

  it.each(table)("$id, $name: the same context gives the same bytes", ({ id, context }) => {
    expect(JSON.stringify(strategies[id].options(context))).toBe(JSON.stringify(strategies[id].options(structuredClone(context))));
  });

  it.each(table)("$id, $name: a recipe of numbered steps for programs that are not PETSc", ({ id, context }) => {
    const steps = strategies[id].recipe(context);
    expect(steps.length).toBeGreaterThanOrEqual(3);
    for (const step of steps) expect(step).toMatch(/\.$/);
  });
});

describe("tolerances and limits", () => {
  it("a plain MINRES file is tighter than the tolerance asked for and shows the true residual", () => {
    const text = textOf("schur-diag-direct");
    const monitored = Number(/-ksp_rtol (\S+)/.exec(text)?.[1]);
    expect(text).toContain("-ksp_type minres");
    expect(monitored).toBeLessThanOrEqual(1e-6 / 10);
    expect(text).toContain("-ksp_monitor_true_residual");
  });

  it.each([
    { name: "contrast above 100", given: { contrast: 1e3 } },
    { name: "contrast with a pressure boundary", given: { contrast: 50, boundary: "pressure-somewhere" as const } },
    { name: "a coefficient far from 1", given: { coefficientScale: 1e-12 } },
    { name: "a fine mesh at degree 2", given: { degree: 2, cells: 1e6 } },
  ])("$name: MINRES is wrapped in a test of the true residual at the tolerance asked for", ({ given }) => {
    const text = textOf("schur-diag-amg", optionsContext(given));
    expect(text).toMatch(/-ksp_type fgmres\n/);
    expect(text).toContain("-ksp_norm_type unpreconditioned");
    expect(text).toContain("-ksp_rtol 0.000001".replace("0.000001", "1e-6"));
    expect(text).toContain("-ksp_ksp_type minres");
  });

  it("a tolerance set by a rule replaces the built-in tightening", () => {
    expect(textOf("schur-diag-direct", optionsContext({ parameters: { monitoredTolerance: 2e-9 } }))).toContain("-ksp_rtol 2e-9");
  });

  it("the iteration limit is twice the high end of the estimate or more", () => {
    expect(textOf("schur-triangular", optionsContext({ iterationsHigh: 61 }))).toContain("-ksp_max_it 122");
  });

  it("gmres from the right when asked for, with its restart", () => {
    const text = textOf("schur-diag-direct", optionsContext({ parameters: { krylovMethod: "gmres", restart: 40 } }));
    expect(text).toContain("-ksp_type gmres");
    expect(text).toContain("-ksp_pc_side right");
    expect(text).toContain("-ksp_gmres_restart 40");
  });
});

describe("settings that the measured runs show to matter", () => {
  it.each([
    { name: "work space is raised at contrast", given: { contrast: 1e4 }, line: "-mat_mumps_icntl_14 100" },
    { name: "nested dissection on larger systems", given: {}, line: "-mat_mumps_icntl_7 5" },
    { name: "the matrix is analysed itself from degree 2 on", given: { degree: 2 }, line: "-mat_mumps_icntl_12 1" },
    { name: "null pivots are detected where the pressure is free", given: {}, line: "-mat_mumps_icntl_24 1" },
  ])("direct: $name", ({ given, line }) => {
    expect(textOf("direct-ldlt", optionsContext(given)).split("\n")).toContain(line);
  });

  it("a pressure boundary leaves no null pivot to detect and no kernel to attach", () => {
    const file = strategies["direct-ldlt"].options(optionsContext({ boundary: "pressure-somewhere" }));
    expect(file.kind === "petsc" && file.text).not.toContain("icntl_24");
    expect(file.kind === "petsc" && file.callingLines).not.toContain("setNullSpace");
  });

  it.each(["nonsense", -1, Number.NaN])("unusable parameters (%s) fall back to the advised values", (value) => {
    const parameters = { gamma: value, restart: value, workspacePercent: value, ordering: value, amgPackage: value, blrTolerance: value };
    for (const id of strategyIds) expect(textOf(id, optionsContext({ parameters }))).toBe(textOf(id));
  });
});
