import type { Boundary, Capability, ContrastPattern, Discretisation, MeshFamily, Priority, SizeKind } from "./answer-sets";

/** How the answers read on screen and in words. */
export const discretisationLabels: Record<Discretisation, string> = {
  "vem-mixed": "Mixed virtual elements",
  rt: "Raviart-Thomas on tetrahedra",
  bdm: "Brezzi-Douglas-Marini on tetrahedra",
  "rt-hex": "Face elements on hexahedra",
};

/** The same without the cells they live on, for where the mesh stands beside them. */
export const discretisationNames: Record<Discretisation, string> = {
  "vem-mixed": "Mixed virtual elements",
  rt: "Raviart-Thomas",
  bdm: "Brezzi-Douglas-Marini",
  "rt-hex": "Hexahedral face elements",
};

export const meshFamilyLabels: Record<MeshFamily, string> = {
  cubes: "Cubes",
  tetrahedra: "Tetrahedra",
  "truncated-octahedra": "Truncated octahedra",
  voronoi: "Voronoi, random seeds",
  "voronoi-relaxed": "Voronoi, relaxed seeds",
  distorted: "Distorted polyhedra",
  imported: "Imported mesh",
};

export const patternLabels: Record<ContrastPattern, string> = {
  constant: "Constant",
  blocks: "Blocks",
  layers: "Layers",
  "random-field": "Random field",
};

export const boundaryLabels: Record<Boundary, string> = {
  "flux-everywhere": "Flux everywhere",
  "pressure-somewhere": "Pressure somewhere",
};

export const priorityLabels: Record<Priority, string> = {
  time: "Time",
  memory: "Memory",
  robustness: "Robustness",
};

export const sizeKindLabels: Record<SizeKind, string> = {
  unknowns: "Unknowns",
  cells: "Cells",
  spacing: "Spacing h",
};

export const capabilityLabels: Record<Capability, { label: string; help: string }> = {
  "parallel-direct": { label: "Parallel direct solver", help: "A sparse factorisation is linked in, such as MUMPS." },
  amg: { label: "Algebraic multigrid", help: "A black-box multigrid is linked in, such as BoomerAMG or GAMG." },
  "block-splitting": { label: "Block splitting", help: "Velocity and pressure index sets can be handed to the solver." },
  "augmented-assembly": { label: "Augmented assembly", help: "The program can add the weighted divergence term to the velocity block." },
  "unassembled-subdomains": { label: "Unassembled subdomain matrices", help: "Each process keeps its own local matrix; domain decomposition by constraints needs it." },
  "hybridised-assembly": { label: "Hybridised assembly", help: "Velocities can be condensed cell by cell to face multipliers." },
  "discrete-gradient-curl": { label: "Discrete gradient and curl", help: "The incidence matrices of the mesh are at hand; auxiliary-space methods need them." },
  "mesh-hierarchy": { label: "Mesh hierarchy", help: "Coarser meshes or lower degrees with transfers between them exist." },
};
