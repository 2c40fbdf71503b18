import fc from "fast-check";
import { capabilities, contrastPatterns, discretisations, familiesOf, boundaries, priorities } from "@/lib/questionnaire/answer-sets";
import { questionnaireSchema, type Questionnaire, type QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";

/** A number drawn evenly in its logarithm. */
const logNumber = (low: number, high: number) =>
  fc.double({ min: Math.log10(low), max: Math.log10(high), noNaN: true }).map((exponent) => Math.min(high, Math.max(low, 10 ** exponent)));

const logWhole = (low: number, high: number) => logNumber(low, high).map((value) => Math.min(high, Math.max(low, Math.round(value))));

const arbitrarySize = fc.oneof(
  fc.record({ by: fc.constant("cells" as const), value: logWhole(1, 1e10) }),
  fc.record({ by: fc.constant("unknowns" as const), value: logWhole(2000, 1e11) }),
  fc.record({ by: fc.constant("spacing" as const), value: logNumber(5e-4, 1) }),
);

/** Faces between the fewest that cells need and thirty a cell, boundary faces among them. */
const arbitraryImported = fc.record({ cells: logWhole(1, 1e8), facesPerCell: fc.double({ min: 4, max: 30, noNaN: true }), share: fc.double({ min: 0, max: 1, noNaN: true }) }).map(
  ({ cells, facesPerCell, share }) => {
    const boundaryFaces = Math.max(4, Math.round(share * 2 * cells));
    return { cells, boundaryFaces, faces: Math.max(boundaryFaces, Math.ceil((facesPerCell * cells + boundaryFaces) / 2)) };
  },
);

const arbitraryHardware = fc.record({
  cores: logWhole(1, 100_000),
  perNode: fc.constantFrom(1, 16, 32, 64, 128),
  memoryPerNodeGiB: logNumber(0.5, 4096),
  timeLimitSeconds: fc.option(logNumber(1, 1e6)),
}).map(({ cores, perNode, ...rest }) => ({ ...rest, cores, nodes: Math.ceil(cores / perNode) }));

const arbitraryElement = fc
  .constantFrom(...discretisations)
  .chain((discretisation) => fc.record({ discretisation: fc.constant(discretisation), meshFamily: fc.constantFrom(...familiesOf[discretisation]), degree: fc.integer({ min: 1, max: 6 }) }));

/** Valid questionnaires over the whole of what the schema takes; hardware is typed in. */
export const arbitraryQuestionnaire: fc.Arbitrary<Questionnaire> = fc
  .record({
    element: arbitraryElement,
    size: arbitrarySize,
    imported: arbitraryImported,
    domainVolume: logNumber(1e-6, 1e12),
    coefficientScale: logNumber(1e-12, 1e12),
    anisotropy: fc.oneof(fc.constant(1), logNumber(1, 1e8)),
    aspectRatio: fc.oneof(fc.constant(1), logNumber(1, 1e5)),
    contrast: fc.record({ ratio: fc.oneof(fc.constant(1), logNumber(1, 1e12)), pattern: fc.constantFrom(...contrastPatterns) }),
    boundary: fc.constantFrom(...boundaries),
    hardware: arbitraryHardware,
    tolerance: logNumber(1e-14, 1e-2),
    repeatedSolves: fc.oneof(fc.constant(1), logWhole(1, 1e7)),
    priority: fc.constantFrom(...priorities),
    available: fc.subarray([...capabilities]),
  })
  .map(({ element, size, imported, ...rest }): QuestionnaireInput => {
    const extent = element.meshFamily === "imported" ? { imported } : { size: sized(size, rest.domainVolume) };
    return { title: "", ...element, ...extent, ...rest };
  })
  .map((input) => questionnaireSchema.parse(input));

/** Spacings are drawn for a unit cube and stretched to the domain. */
function sized(size: { by: "cells" | "unknowns" | "spacing"; value: number }, domainVolume: number) {
  return size.by === "spacing" ? { by: size.by, value: size.value * Math.cbrt(domainVolume) } : size;
}
