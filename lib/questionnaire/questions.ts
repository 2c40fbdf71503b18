export const questionGroups = ["Problem", "Mesh and element", "Machine", "Program"] as const;
export type QuestionGroup = (typeof questionGroups)[number];

/** A question's wording. `name` is the answer's path in the questionnaire; `help` is the one line under it. */
export type Question = { group: QuestionGroup; label: string; unit: string; help: string; more: boolean };

/** Every question by its path; `more` ones have a default that fits most cases and stand folded. */
export const questions = {
  title: { group: "Problem", label: "Title", unit: "", more: false, help: "A name your colleagues will recognise in the list; may stay empty." },
  "contrast.pattern": {
    group: "Problem", label: "Coefficient pattern", unit: "", more: false,
    help: "Where the coefficient jumps: aligned blocks and layers are kinder to multigrid than a rough random field.",
  },
  "contrast.ratio": {
    group: "Problem", label: "Coefficient contrast", unit: "max/min", more: false,
    help: "Large jumps leave iteration counts of diagonal scaling alone but spread the true residual.",
  },
  boundary: {
    group: "Problem", label: "Boundary condition", unit: "", more: false,
    help: "With the flux given everywhere the pressure is fixed only up to a constant, and the solver must be told.",
  },
  tolerance: {
    group: "Problem", label: "Relative tolerance", unit: "", more: false,
    help: "Measured on the true residual; below the discretisation error more digits buy nothing.",
  },
  repeatedSolves: {
    group: "Problem", label: "Solves with this matrix", unit: "", more: false,
    help: "Time steps or right-hand sides that share one set-up: many of them pay for a factorisation.",
  },
  coefficientScale: {
    group: "Problem", label: "Coefficient scale", unit: "", more: true,
    help: "Geometric mean of the coefficient; the augmentation parameter is divided by it.",
  },
  anisotropy: {
    group: "Problem", label: "Coefficient anisotropy", unit: "max/min", more: true,
    help: "Largest over smallest direction of the coefficient; layered rock easily has 10 to 1000.",
  },
  discretisation: {
    group: "Mesh and element", label: "Discretisation", unit: "", more: false,
    help: "The velocity space decides the fill of the factor and how far diagonal scaling is from the mass matrix.",
  },
  degree: {
    group: "Mesh and element", label: "Degree", unit: "", more: false,
    help: "Lowest order is 1. Block preconditioners lose ground with every degree; the direct solver loses less.",
  },
  meshFamily: {
    group: "Mesh and element", label: "Mesh family", unit: "", more: false,
    help: "More faces a cell mean larger separators, so a direct solver pays more for polyhedra.",
  },
  "size.by": { group: "Mesh and element", label: "Size given by", unit: "", more: false, help: "The other two follow from the mesh family and the degree." },
  "size.value": {
    group: "Mesh and element", label: "Size", unit: "", more: false,
    help: "Structured meshes take the nearest count that exists.",
  },
  "imported.cells": { group: "Mesh and element", label: "Cells", unit: "", more: false, help: "As your mesh file counts them." },
  "imported.faces": { group: "Mesh and element", label: "Faces", unit: "", more: false, help: "All faces, inner ones once." },
  "imported.boundaryFaces": { group: "Mesh and element", label: "Boundary faces", unit: "", more: false, help: "Faces with a cell on one side only." },
  domainVolume: {
    group: "Mesh and element", label: "Domain volume", unit: "length³", more: true,
    help: "Sets the spacing h = (volume / cells)^(1/3), and with it the augmentation parameter.",
  },
  aspectRatio: {
    group: "Mesh and element", label: "Cell aspect ratio", unit: "longest/shortest", more: true,
    help: "Flat cells act like an anisotropic coefficient and slow multigrid down.",
  },
  "hardware.machineId": { group: "Machine", label: "Machine sheet", unit: "", more: false, help: "A saved computer fills memory, bandwidth and network." },
  "hardware.cores": {
    group: "Machine", label: "Cores", unit: "", more: false,
    help: "Over all nodes. Many cores starve a strategy whose inner solve is a factorisation.",
  },
  "hardware.nodes": { group: "Machine", label: "Nodes", unit: "", more: false, help: "The cores are spread evenly over them." },
  "hardware.memoryPerNodeGiB": {
    group: "Machine", label: "Memory per node", unit: "GiB", more: false,
    help: "In three dimensions a direct solver runs out of memory before it runs out of time.",
  },
  "hardware.timeLimitSeconds": {
    group: "Machine", label: "Time limit", unit: "s", more: true,
    help: "The queue's limit; a run beyond it counts as failed.",
  },
  available: {
    group: "Program", label: "What your program has", unit: "", more: false,
    help: "Strategies that need a missing piece are shown as unavailable, so that you see what it would bring.",
  },
  priority: {
    group: "Program", label: "What matters most", unit: "", more: false,
    help: "Time ranks by predicted time; memory and robustness shift the ranking in a stated way.",
  },
} as const satisfies Record<string, Question>;

export type QuestionName = keyof typeof questions;
