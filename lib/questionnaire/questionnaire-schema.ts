import { z } from "zod";
import {
  boundaries,
  capabilities,
  contrastPatterns,
  discretisations,
  familiesOf,
  meshFamilies,
  priorities,
  sizeKinds,
} from "./answer-sets";

const wording = (what: string, kind: string) => ({
  error: (issue: { input?: unknown }) =>
    issue.input === undefined || issue.input === null ? `${what}: give a number.` : `${what} must be a ${kind}.`,
});
const finite = (what: string) => z.number(wording(what, "number"));
const whole = (what: string) => z.int(wording(what, "whole number"));
const positive = (what: string) => finite(what).gt(0, `${what} must be greater than 0.`);
const wholeFromOne = (what: string, max: number) =>
  whole(what).min(1, `${what} must be at least 1.`).max(max, `${what} can be at most ${max}.`);

const sizeSchema = z.strictObject({
  by: z.enum(sizeKinds),
  value: positive("The size").max(1e12, "The size can be at most 1e12."),
});

const importedSchema = z.strictObject({
  cells: whole("The number of cells").min(0, "Counts can't be negative.").max(1e10),
  faces: whole("The number of faces").min(0, "Counts can't be negative.").max(1e11),
  boundaryFaces: whole("The number of boundary faces").min(0, "Counts can't be negative.").max(1e11),
});

const contrastSchema = z.strictObject({
  ratio: finite("The contrast").min(1, "Contrast is the largest over the smallest coefficient: at least 1.").max(1e12, "Contrast can be at most 1e12."),
  pattern: z.enum(contrastPatterns),
});

/**
 * Hardware: either typed in (`cores` over all nodes, `nodes`, `memoryPerNodeGiB`; the machine's rates fall to defaults) or a
 * saved machine sheet (`machineId` + `cores`). One object instead of a union, so that errors name the field.
 */
const hardwareSchema = z.strictObject({
  machineId: z.uuid("The machine sheet's id must be a UUID.").optional(),
  cores: wholeFromOne("Cores", 4_000_000),
  nodes: wholeFromOne("Nodes", 100_000).optional(),
  memoryPerNodeGiB: positive("Memory per node").max(1e6, "Memory per node can be at most 1e6 GiB.").optional(),
  timeLimitSeconds: positive("The time limit").max(1e8).nullable().default(null),
});

const questionnaireShape = z.strictObject({
  title: z.string().trim().max(120, "A title has at most 120 characters.").default(""),
  discretisation: z.enum(discretisations),
  degree: whole("The degree").min(1, "The lowest degree is 1.").max(6, "Degrees above 6 are not covered."),
  meshFamily: z.enum(meshFamilies),
  size: sizeSchema.optional(),
  imported: importedSchema.optional(),
  domainVolume: positive("The domain's volume").max(1e30).default(1),
  coefficientScale: positive("The coefficient's scale").max(1e30).default(1),
  anisotropy: finite("Anisotropy").min(1, "Anisotropy is the largest over the smallest direction: at least 1.").max(1e8).default(1),
  aspectRatio: finite("The aspect ratio").min(1, "The aspect ratio is longest over shortest: at least 1.").max(1e5).default(1),
  contrast: contrastSchema,
  boundary: z.enum(boundaries),
  hardware: hardwareSchema,
  tolerance: finite("The tolerance").min(1e-14, "The tolerance is at least 1e-14.").max(1e-2, "The tolerance is at most 1e-2."),
  repeatedSolves: wholeFromOne("Repeated solves", 10_000_000).default(1),
  priority: z.enum(priorities).default("time"),
  available: z.array(z.enum(capabilities)).max(capabilities.length).default([]),
});

type Shape = z.output<typeof questionnaireShape>;
type Issue = { path: (string | number)[]; message: string };

const discretisationWords: Record<Shape["discretisation"], string> = {
  "vem-mixed": "Mixed virtual elements",
  rt: "Raviart-Thomas elements",
  bdm: "Brezzi-Douglas-Marini elements",
  "rt-hex": "Hexahedral face elements",
};

function familyIssue(q: Shape): Issue | null {
  const families = familiesOf[q.discretisation];
  if (families.includes(q.meshFamily)) return null;
  return {
    path: ["meshFamily"],
    message: `${discretisationWords[q.discretisation]} live on ${families.join(", ")} meshes; choose one of these or another discretisation.`,
  };
}

function sizeIssues(q: Shape): Issue[] {
  if (q.meshFamily !== "imported") {
    const issues: Issue[] = [];
    if (!q.size) issues.push({ path: ["size"], message: "Give the size by cells, unknowns or spacing." });
    const given = q.imported;
    if (given && (given.cells > 0 || given.faces > 0 || given.boundaryFaces > 0)) {
      issues.push({ path: ["imported"], message: "Counts of an imported mesh go with the mesh family imported only." });
    }
    return issues;
  }
  const counts = q.imported;
  if (!counts) return [{ path: ["imported"], message: "An imported mesh needs its numbers of cells, faces and boundary faces." }];
  return importedIssues(counts);
}

/** Every polyhedral cell has at least four faces, and an inner face belongs to two cells. */
function importedIssues(counts: NonNullable<Shape["imported"]>): Issue[] {
  const issues: Issue[] = [];
  if (counts.cells < 1) issues.push({ path: ["imported", "cells"], message: "An imported mesh has at least 1 cell." });
  if (counts.faces < 4) issues.push({ path: ["imported", "faces"], message: "An imported mesh has at least 4 faces." });
  if (counts.boundaryFaces < 4) {
    issues.push({ path: ["imported", "boundaryFaces"], message: "A mesh that fills a domain has at least 4 boundary faces." });
  }
  if (issues.length > 0) return issues;
  if (counts.boundaryFaces > counts.faces) {
    issues.push({ path: ["imported", "boundaryFaces"], message: "Boundary faces are among the faces: there can't be more of them." });
  } else if (2 * counts.faces - counts.boundaryFaces < 4 * counts.cells) {
    issues.push({ path: ["imported", "faces"], message: "Too few faces: every cell has at least 4, and inner faces are shared by two cells." });
  }
  return issues;
}

function hardwareIssues(q: Shape): Issue[] {
  const { machineId, cores, nodes, memoryPerNodeGiB } = q.hardware;
  if (machineId !== undefined) {
    const given = memoryPerNodeGiB !== undefined ? "memoryPerNodeGiB" : nodes !== undefined ? "nodes" : null;
    return given ? [{ path: ["hardware", given], message: "The machine sheet gives this: leave it out, or leave the sheet out." }] : [];
  }
  const issues: Issue[] = [];
  if (memoryPerNodeGiB === undefined) {
    issues.push({ path: ["hardware", "memoryPerNodeGiB"], message: "Give the memory per node, or choose a machine sheet." });
  }
  if (nodes !== undefined && nodes > cores) {
    issues.push({ path: ["hardware", "nodes"], message: "More nodes than cores: cores counts all nodes together." });
  }
  return issues;
}

/**
 * The questionnaire as it crosses the API; unknown fields are refused. An imported mesh takes its size from its counts, a
 * `size` beside them is ignored. A contrast above 1 with pattern "constant" is read as "blocks". Checks that need sizes (unknowns below one cell,
 * more cores than unknowns) are made by `checkSizes` in lib/sizes, which reports in the same paths.
 */
export const questionnaireSchema = questionnaireShape.superRefine((q, context) => {
  const issues: (Issue | null)[] = [familyIssue(q), ...sizeIssues(q), ...hardwareIssues(q)];
  if (new Set(q.available).size !== q.available.length) {
    issues.push({ path: ["available"], message: "Each capability can be named once." });
  }
  for (const issue of issues) if (issue) context.addIssue({ code: "custom", path: issue.path, message: issue.message });
});

export type QuestionnaireInput = z.input<typeof questionnaireSchema>;
export type Questionnaire = z.output<typeof questionnaireSchema>;
