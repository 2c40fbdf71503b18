import { describe, expect, it } from "vitest";
import { fieldErrorsOf } from "@/lib/shared/field-errors";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { questionnaireSchema } from "@/lib/questionnaire/questionnaire-schema";

const { size: _size, ...withoutSize } = defaultQuestionnaire;
const imported = { cells: 1000, faces: 3300, boundaryFaces: 600 };

const refused: [string, unknown, string][] = [
  ["degree 0", { ...defaultQuestionnaire, degree: 0 }, "degree"],
  ["degree 7", { ...defaultQuestionnaire, degree: 7 }, "degree"],
  ["degree 1.5", { ...defaultQuestionnaire, degree: 1.5 }, "degree"],
  ["contrast below 1", { ...defaultQuestionnaire, contrast: { ratio: 0.5, pattern: "blocks" } }, "contrast.ratio"],
  ["memory 0", { ...defaultQuestionnaire, hardware: { ...defaultQuestionnaire.hardware, memoryPerNodeGiB: 0 } }, "hardware.memoryPerNodeGiB"],
  ["no memory and no sheet", { ...defaultQuestionnaire, hardware: { cores: 4 } }, "hardware.memoryPerNodeGiB"],
  ["more nodes than cores", { ...defaultQuestionnaire, hardware: { cores: 4, nodes: 8, memoryPerNodeGiB: 1 } }, "hardware.nodes"],
  ["a size of 0", { ...defaultQuestionnaire, size: { by: "cells", value: 0 } }, "size.value"],
  ["no size", withoutSize, "size"],
  ["an infinite size", { ...defaultQuestionnaire, size: { by: "cells", value: Number.POSITIVE_INFINITY } }, "size.value"],
  ["an imported mesh without counts", { ...withoutSize, meshFamily: "imported" }, "imported"],
  ["an imported mesh without faces", { ...withoutSize, meshFamily: "imported", imported: { ...imported, faces: 0 } }, "imported.faces"],
  ["an imported mesh without cells", { ...withoutSize, meshFamily: "imported", imported: { ...imported, cells: 0 } }, "imported.cells"],
  ["more boundary faces than faces", { ...withoutSize, meshFamily: "imported", imported: { ...imported, boundaryFaces: 4000 } }, "imported.boundaryFaces"],
  ["cells with fewer than four faces", { ...withoutSize, meshFamily: "imported", imported: { ...imported, faces: 1000 } }, "imported.faces"],
  ["counts beside a structured mesh", { ...defaultQuestionnaire, imported }, "imported"],
  ["Raviart-Thomas tetrahedra on cubes", { ...defaultQuestionnaire, discretisation: "rt" }, "meshFamily"],
  ["hexahedral elements on Voronoi cells", { ...defaultQuestionnaire, discretisation: "rt-hex", meshFamily: "voronoi" }, "meshFamily"],
  ["tolerance 0.1", { ...defaultQuestionnaire, tolerance: 0.1 }, "tolerance"],
  ["an unknown field", { ...defaultQuestionnaire, compressibility: 1 }, "compressibility"],
  ["an unknown nested field", { ...defaultQuestionnaire, contrast: { ratio: 1, pattern: "constant", extra: 1 } }, "contrast.extra"],
  ["a capability named twice", { ...defaultQuestionnaire, available: ["amg", "amg"] }, "available"],
  ["a sheet with memory beside it", { ...defaultQuestionnaire, hardware: { machineId: "0193e4a2-1111-4111-8111-111111111111", cores: 4, memoryPerNodeGiB: 1 } }, "hardware.memoryPerNodeGiB"],
];

describe("questionnaireSchema", () => {
  it.each(refused)("refuses %s at its field", (_name, questionnaire, path) => {
    const parsed = questionnaireSchema.safeParse(questionnaire);
    expect(parsed.success).toBe(false);
    if (parsed.success) return;
    const errors = fieldErrorsOf(parsed.error);
    expect(errors.map((error) => error.path)).toContain(path);
    for (const error of errors) expect(error.message).toMatch(/\S+ \S+/);
  });

  it("accepts the defaults and fills the optional answers", () => {
    const { domainVolume: _v, coefficientScale: _c, anisotropy: _a, aspectRatio: _r, title: _t, ...least } = defaultQuestionnaire;
    expect(questionnaireSchema.parse(least)).toMatchObject({ domainVolume: 1, coefficientScale: 1, anisotropy: 1, aspectRatio: 1, title: "" });
  });

  it("accepts an imported mesh with its counts, and zero counts beside another family", () => {
    expect(questionnaireSchema.safeParse({ ...withoutSize, meshFamily: "imported", imported }).success).toBe(true);
    expect(questionnaireSchema.safeParse({ ...defaultQuestionnaire, imported: { cells: 0, faces: 0, boundaryFaces: 0 } }).success).toBe(true);
  });
});

describe("messages", () => {
  it("ask for a number in words when one is missing or can't be read", () => {
    const parsed = questionnaireSchema.safeParse({ ...defaultQuestionnaire, tolerance: Number.NaN, size: { by: "cells", value: undefined } });
    expect(parsed.error && fieldErrorsOf(parsed.error)).toEqual(
      expect.arrayContaining([
        { path: "tolerance", message: "The tolerance must be a number." },
        { path: "size.value", message: "The size: give a number." },
      ]),
    );
  });
});
