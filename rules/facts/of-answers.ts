import { booleanFact, listFact, numberFact, stringFact, type FactDefinition } from "../fact";

/** Value of `timeLimitSeconds` where no limit was given: the questionnaire's own largest. */
export const noTimeLimitSeconds = 1e8;

/**
 * Facts that repeat the questionnaire's answers, with the hardware resolved. The closed sets are those of
 * lib/questionnaire/answer-sets.ts, which this folder may not import; a test holds the two equal.
 */
export const answerFacts: readonly FactDefinition[] = [
  stringFact({
    name: "discretisation",
    label: "discretisation",
    group: "answers",
    allowed: ["vem-mixed", "rt", "bdm", "rt-hex"],
    description: "The H(div)-conforming element.",
  }),
  numberFact({
    name: "degree",
    label: "degree",
    group: "answers",
    range: [1, 6],
    whole: true,
    description: "Polynomial degree; the lowest order is 1.",
  }),
  stringFact({
    name: "meshFamily",
    label: "mesh family",
    group: "answers",
    allowed: ["cubes", "tetrahedra", "truncated-octahedra", "voronoi", "voronoi-relaxed", "distorted", "imported"],
    description: "Shape and regularity of the cells.",
  }),
  numberFact({ name: "anisotropy", label: "anisotropy of the coefficient", group: "answers", range: [1, 1e8], description: "Largest over smallest direction." }),
  numberFact({ name: "aspectRatio", label: "aspect ratio of the cells", group: "answers", range: [1, 1e5], description: "Longest over shortest direction of a cell." }),
  numberFact({ name: "contrastRatio", label: "contrast", group: "answers", range: [1, 1e12], description: "Largest over smallest coefficient." }),
  stringFact({
    name: "contrastPattern",
    label: "contrast pattern",
    group: "answers",
    allowed: ["constant", "blocks", "layers", "random-field"],
    description: "How the coefficient varies in space.",
  }),
  stringFact({
    name: "boundary",
    label: "boundary condition",
    group: "answers",
    allowed: ["flux-everywhere", "pressure-somewhere"],
    description: "With the flux prescribed everywhere the pressure is known up to a constant.",
  }),
  numberFact({ name: "cores", label: "cores", plural: true, group: "answers", range: [1, 4e6], whole: true, description: "Cores over all nodes." }),
  numberFact({ name: "nodes", label: "nodes", plural: true, group: "answers", range: [1, 1e5], whole: true, description: "Nodes used." }),
  numberFact({ name: "memoryPerNodeGiB", label: "memory per node", unit: "GiB", group: "answers", range: [0, 1e6], description: "Memory of one node." }),
  numberFact({ name: "memoryTotalGiB", label: "memory of all nodes", unit: "GiB", group: "answers", range: [0, 1e11], description: "Nodes times memory per node." }),
  numberFact({
    name: "networkLatencyMicroseconds",
    label: "network latency",
    unit: "µs",
    group: "answers",
    range: [0, 1e5],
    description: "One small message between nodes.",
  }),
  booleanFact({ name: "timeLimitGiven", label: "a time limit", group: "answers", description: "Whether the case names a time limit." }),
  numberFact({
    name: "timeLimitSeconds",
    label: "time limit",
    unit: "s",
    group: "answers",
    range: [0, noTimeLimitSeconds],
    description: "The case's time limit; 1e8 where none is given.",
  }),
  numberFact({ name: "tolerance", label: "tolerance", group: "answers", range: [1e-14, 1e-2], description: "Relative residual asked for." }),
  numberFact({
    name: "repeatedSolves",
    label: "solves with the same matrix",
    plural: true,
    group: "answers",
    range: [1, 1e7],
    whole: true,
    description: "Time steps or right-hand sides that share one matrix.",
  }),
  stringFact({ name: "priority", label: "priority", group: "answers", allowed: ["time", "memory", "robustness"], description: "What counts most to the person who asks." }),
  listFact({
    name: "available",
    label: "what the program supplies",
    group: "answers",
    allowed: [
      "parallel-direct",
      "amg",
      "block-splitting",
      "augmented-assembly",
      "unassembled-subdomains",
      "hybridised-assembly",
      "discrete-gradient-curl",
      "mesh-hierarchy",
    ],
    description: "Capabilities of the user's program.",
  }),
];
