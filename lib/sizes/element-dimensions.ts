import type { Discretisation } from "@/lib/questionnaire/answer-sets";

/** Degrees of freedom of an element: velocity moments per face and inside the cell, pressures per cell. */
export type ElementDimensions = { perFace: number; perCellVelocity: number; perCellPressure: number };

/**
 * Dimensions of the element `discretisation` of degree `degree` >= 1.
 * Virtual elements: Beirao da Veiga, Brezzi, Marini & Russo, Numer. Math. 133 (2016); the others: Arnold & Logg, Periodic Table of the Finite
 * Elements, SIAM News 47(9), 2014 (lowest order = 1).
 */
export function elementDimensions(discretisation: Discretisation, degree: number): ElementDimensions {
  return dimensions[discretisation](degree);
}

/** dim P_k in three variables; 0 below degree 0. */
export function polynomials3(degree: number): number {
  return degree < 0 ? 0 : ((degree + 1) * (degree + 2) * (degree + 3)) / 6;
}

/** dim P_k in two variables; 0 below degree 0. */
export function polynomials2(degree: number): number {
  return degree < 0 ? 0 : ((degree + 1) * (degree + 2)) / 2;
}

const dimensions: Record<Discretisation, (degree: number) => ElementDimensions> = {
  "vem-mixed": (k) => ({
    perFace: polynomials2(k),
    perCellVelocity: polynomials3(k - 1) - 1 + 3 * polynomials3(k) - polynomials3(k + 1) + 1,
    perCellPressure: polynomials3(k - 1),
  }),
  rt: (r) => ({ perFace: polynomials2(r - 1), perCellVelocity: 3 * polynomials3(r - 2), perCellPressure: polynomials3(r - 1) }),
  bdm: (r) => ({
    perFace: polynomials2(r),
    perCellVelocity: 3 * polynomials3(r) - 4 * polynomials2(r),
    perCellPressure: polynomials3(r - 1),
  }),
  "rt-hex": (r) => ({ perFace: r * r, perCellVelocity: 3 * r * r * (r - 1), perCellPressure: r ** 3 }),
};
