import { describe, expect, it } from "vitest";
import { checkSizes } from "@/lib/sizes/check-sizes";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import type { QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";
import { caseAnswers } from "@/tests/support/case-answers";

function pathsOf(changes: Partial<QuestionnaireInput>): string[] {
  const answers = caseAnswers(changes);
  return checkSizes(answers, computeSizes(answers)).map(({ path }) => path);
}

describe("Contradictions that only the sizes show", () => {
  it.each([
    ["unknowns below one cell", { size: { by: "unknowns", value: 5 } }, "size.value"],
    ["less than one cell", { size: { by: "cells", value: 0.5 } }, "size.value"],
    ["a spacing larger than the domain", { size: { by: "spacing", value: 2 } }, "size.value"],
    ["more cells than can be counted", { size: { by: "spacing", value: 1e-9 } }, "size.value"],
    ["more cores than unknowns", { size: { by: "cells", value: 8 }, hardware: { cores: 4096, nodes: 64, memoryPerNodeGiB: 64 } }, "hardware.cores"],
  ] as const)("%s is refused at its field", (_name, changes, path) => {
    expect(pathsOf(changes)).toContain(path);
  });

  it.each([
    ["the default case", {}],
    ["one cell", { size: { by: "cells", value: 1 }, hardware: { cores: 1, memoryPerNodeGiB: 4 } }],
    ["a spacing as large as the domain", { size: { by: "spacing", value: 1 }, hardware: { cores: 1, memoryPerNodeGiB: 4 } }],
    ["an imported mesh", { meshFamily: "imported", imported: { cells: 1000, faces: 7100, boundaryFaces: 600 } }],
  ] as const)("%s is accepted", (_name, changes) => {
    expect(pathsOf(changes)).toEqual([]);
  });
});
