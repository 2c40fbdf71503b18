import type { Role } from "@/lib/auth/permissions";
import type { QuestionnaireInput } from "@/lib/questionnaire/questionnaire-schema";
import type { Machine } from "@/lib/questionnaire/machine";

/**
 * The demonstration's story. Everything in it is invented: no person, place, organisation, river or computer of this
 * description exists, and no figure in it was measured.
 */
export type DemonstrationPerson = { name: string; mailbox: string; role: Role };
export type DemonstrationTeam = { name: string; slug: string; people: readonly DemonstrationPerson[]; machines: readonly Machine[] };

export const basinTeam: DemonstrationTeam = {
  name: "Ellorin Basin Desk",
  slug: "ellorin-basin-desk",
  people: [
    { name: "Maravel Odstrey", mailbox: "owner", role: "owner" },
    { name: "Corvin Thelby", mailbox: "curator", role: "curator" },
    { name: "Ysanne Brockmire", mailbox: "analyst", role: "analyst" },
    { name: "Pell Hargrove-Anning", mailbox: "observer", role: "observer" },
  ],
  machines: [
    {
      name: "Heron (one node)", coresPerNode: 32, nodes: 1, memoryPerNodeGiB: 128, bandwidthPerNodeGBps: 160, gflopsPerCore: 12,
      networkLatencyMicroseconds: 2, networkBandwidthGBps: 12,
    },
    {
      name: "Weir (cluster)", coresPerNode: 64, nodes: 24, memoryPerNodeGiB: 256, bandwidthPerNodeGBps: 300, gflopsPerCore: 14,
      networkLatencyMicroseconds: 1.5, networkBandwidthGBps: 20,
    },
    {
      name: "Desk machine", coresPerNode: 8, nodes: 1, memoryPerNodeGiB: 32, bandwidthPerNodeGBps: 45, gflopsPerCore: 20,
      networkLatencyMicroseconds: 1, networkBandwidthGBps: 10,
    },
  ],
};

export const harbourTeam: DemonstrationTeam = {
  name: "Brindle Harbour Heat Group",
  slug: "brindle-harbour-heat-group",
  people: [
    { name: "Tamsel Quorry", mailbox: "owner", role: "owner" },
    { name: "Idris Vanterpole", mailbox: "analyst", role: "analyst" },
  ],
  machines: [
    {
      name: "Lamp room node", coresPerNode: 48, nodes: 2, memoryPerNodeGiB: 192, bandwidthPerNodeGBps: 220, gflopsPerCore: 12,
      networkLatencyMicroseconds: 2, networkBandwidthGBps: 12,
    },
  ],
};

type Theme = {
  title: string;
  answers: Partial<QuestionnaireInput>;
  /** Which machine of the team, and how many of its cores. */
  machine: number;
  cores: number;
};

const polyhedra = { discretisation: "vem-mixed" } as const;

/** What the Ellorin desk works on: an invented river basin, its aquifer, a dam and a disposal study, each at several sizes. */
export const basinThemes: readonly Theme[] = [
  { title: "Ellorin aquifer, steady flow", answers: { ...polyhedra, meshFamily: "cubes", degree: 1, available: ["parallel-direct", "block-splitting"] }, machine: 0, cores: 32 },
  { title: "Ellorin aquifer, polyhedral grid", answers: { ...polyhedra, meshFamily: "voronoi-relaxed", degree: 1 }, machine: 0, cores: 32 },
  { title: "Upper valley clay lenses", answers: { ...polyhedra, meshFamily: "voronoi", degree: 1, contrast: { ratio: 1e4, pattern: "blocks" } }, machine: 1, cores: 64 },
  { title: "Gravel terrace, second order", answers: { ...polyhedra, meshFamily: "cubes", degree: 2, available: ["parallel-direct", "amg", "hybridised-assembly"] }, machine: 0, cores: 32 },
  { title: "Dam foundation seepage", answers: { discretisation: "bdm", meshFamily: "tetrahedra", degree: 1, boundary: "pressure-somewhere" }, machine: 0, cores: 16 },
  { title: "Dam foundation seepage, lowest order", answers: { discretisation: "rt", meshFamily: "tetrahedra", degree: 1, boundary: "pressure-somewhere", available: ["amg", "augmented-assembly", "discrete-gradient-curl"] }, machine: 0, cores: 16 },
  { title: "Layered delta", answers: { discretisation: "rt-hex", meshFamily: "cubes", degree: 1, contrast: { ratio: 1e6, pattern: "layers" }, anisotropy: 30 }, machine: 1, cores: 128 },
  { title: "Spillway scour, third order", answers: { discretisation: "rt", meshFamily: "tetrahedra", degree: 3 }, machine: 2, cores: 8 },
  { title: "Infiltration ponds, time stepping", answers: { discretisation: "rt-hex", meshFamily: "cubes", degree: 1, repeatedSolves: 200, available: ["parallel-direct", "amg", "hybridised-assembly"] }, machine: 0, cores: 32 },
  { title: "Fracture corridor", answers: { ...polyhedra, meshFamily: "distorted", degree: 1, contrast: { ratio: 1e3, pattern: "random-field" }, available: ["parallel-direct", "amg", "unassembled-subdomains"] }, machine: 1, cores: 64 },
  { title: "Fine wells, second order", answers: { ...polyhedra, meshFamily: "truncated-octahedra", degree: 2, available: ["parallel-direct", "block-splitting"] }, machine: 1, cores: 128 },
  { title: "Flood plain heat exchange", answers: { discretisation: "bdm", meshFamily: "tetrahedra", degree: 2, boundary: "pressure-somewhere" }, machine: 1, cores: 64 },
];

export const harbourThemes: readonly Theme[] = [
  { title: "Quay wall heat flow", answers: { discretisation: "rt-hex", meshFamily: "cubes", degree: 1, boundary: "pressure-somewhere" }, machine: 0, cores: 48 },
  { title: "Cable trench losses", answers: { discretisation: "rt", meshFamily: "tetrahedra", degree: 1, contrast: { ratio: 400, pattern: "layers" } }, machine: 0, cores: 24 },
  { title: "Boiler hall, second order", answers: { discretisation: "bdm", meshFamily: "tetrahedra", degree: 2 }, machine: 0, cores: 48 },
];

export type { Theme };
