/** Closed sets of the questionnaire's answers. */
export const discretisations = ["vem-mixed", "rt", "bdm", "rt-hex"] as const;
export type Discretisation = (typeof discretisations)[number];

export const meshFamilies = [
  "cubes",
  "tetrahedra",
  "truncated-octahedra",
  "voronoi",
  "voronoi-relaxed",
  "distorted",
  "imported",
] as const;
export type MeshFamily = (typeof meshFamilies)[number];

export const contrastPatterns = ["constant", "blocks", "layers", "random-field"] as const;
export type ContrastPattern = (typeof contrastPatterns)[number];

export const boundaries = ["flux-everywhere", "pressure-somewhere"] as const;
export type Boundary = (typeof boundaries)[number];

export const priorities = ["time", "memory", "robustness"] as const;
export type Priority = (typeof priorities)[number];

/** What the user's program can supply to a strategy. */
export const capabilities = [
  "parallel-direct",
  "amg",
  "block-splitting",
  "augmented-assembly",
  "unassembled-subdomains",
  "hybridised-assembly",
  "discrete-gradient-curl",
  "mesh-hierarchy",
] as const;
export type Capability = (typeof capabilities)[number];

export const sizeKinds = ["cells", "unknowns", "spacing"] as const;
export type SizeKind = (typeof sizeKinds)[number];

/** Mesh families each discretisation can live on. */
export const familiesOf: Record<Discretisation, readonly MeshFamily[]> = {
  "vem-mixed": meshFamilies,
  rt: ["tetrahedra", "distorted", "imported"],
  bdm: ["tetrahedra", "distorted", "imported"],
  "rt-hex": ["cubes", "distorted", "imported"],
};
