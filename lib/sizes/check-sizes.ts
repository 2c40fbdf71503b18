import type { Answers } from "@/lib/questionnaire/answers";
import type { FieldError } from "@/lib/shared/app-error";
import { elementDimensions } from "./element-dimensions";
import { askedCells } from "./compute-sizes";
import { meshCounts, meshKindOf } from "./mesh-counts";
import type { Sizes } from "./sizes";

/** Above this the counts are no longer exact in double precision. */
const mostUnknowns = 2 ** 53;

/**
 * Contradictions that only the sizes show: a size below one cell, counts that are not finite or too large to be exact, more cores than
 * unknowns. Paths are those of the questionnaire's fields; empty when all is well.
 */
export function checkSizes(answers: Answers, sizes: Sizes): FieldError[] {
  const sizePath = answers.meshFamily === "imported" ? "imported.cells" : "size.value";
  const counts = [sizes.unknowns, sizes.nonzeros.total, sizes.schurNonzeros, sizes.spacing, sizes.facesPerCell];
  if (!counts.every(Number.isFinite) || sizes.unknowns > mostUnknowns || sizes.spacing <= 0) {
    return [{ path: sizePath, message: "This size gives counts too large to compute; choose a smaller mesh." }];
  }
  const errors: FieldError[] = [];
  if (belowOneCell(answers)) errors.push({ path: "size.value", message: belowOneCellMessage(answers) });
  if (answers.hardware.cores > sizes.unknowns) {
    errors.push({
      path: "hardware.cores",
      message: `More cores (${answers.hardware.cores}) than unknowns (${sizes.unknowns}): choose fewer cores or a finer mesh.`,
    });
  }
  return errors;
}

function belowOneCell(answers: Answers): boolean {
  if (answers.size === undefined) return false;
  const kind = meshKindOf(answers);
  if (kind === null) return false;
  const smallest = kind === "voronoi" || kind === "voronoi-relaxed" ? 1 : 0.999;
  if (answers.size.by === "unknowns") return answers.size.value < smallestUnknowns(answers);
  const cells = askedCells(answers);
  return cells !== null && cells < smallest;
}

/** Unknowns of the smallest mesh: one cell with its own faces. */
function smallestUnknowns(answers: Answers): number {
  const { perFace, perCellVelocity, perCellPressure } = elementDimensions(answers.discretisation, answers.degree);
  return perFace * cellFaces(answers) + perCellVelocity + perCellPressure;
}

function cellFaces(answers: Answers): number {
  const kind = meshKindOf(answers);
  if (kind === "cubes") return meshCounts("cubes", 1).faces;
  return 4;
}

function belowOneCellMessage(answers: Answers): string {
  if (answers.size?.by === "spacing") return "The spacing is larger than the domain: less than one cell. Choose a smaller spacing.";
  if (answers.size?.by === "cells") return "Less than one cell: choose at least 1.";
  return `Fewer unknowns than one cell has (${smallestUnknowns(answers)}): choose more.`;
}
