import type { Answers } from "@/lib/questionnaire/answers";
import { flatCutFacesOf } from "@/lib/sizes/compute-sizes";
import { cellsInLayerOf } from "@/lib/sizes/cell-layers";
import { couplingPerFace } from "@/lib/sizes/nonzeros";
import type { Sizes } from "@/lib/sizes/sizes";
import { advisedGamma } from "@/lib/strategies/regularisation";
import type { CostKit, DirectCost, SpectralInterval } from "@/lib/strategies/cost";
import type { ModelConstants } from "./constants";
import { directCost } from "./direct-cost";
import { dissect, type FrontTree } from "./front-model";
import { iterationCounts } from "./iteration-counts";
import { machineModel, type MachineModel } from "./machine-model";
import { multigridCost } from "./multigrid-cost";
import { residualLag } from "./residual-lag";
import { spectralInterval } from "./spectral-interval";
import { subdomainCost } from "./subdomain-cost";
import { advisedVariant, type Variant } from "./variant";

/** Binds the models to one case and machine. Results that several strategies need are computed once. */
export function makeKit(answers: Answers, sizes: Sizes, constants: ModelConstants, variant: Variant = advisedVariant): CostKit {
  const machine = machineModel(answers.hardware, constants);
  const system = activeSystem(sizes);
  const multipliers = multiplierSystem(answers, sizes);
  const interval = once<SpectralInterval>(() => spectralInterval(answers));
  const gamma = advisedGamma({ answers, sizes });
  return {
    system,
    multipliers,
    gamma,
    spectralInterval: interval,
    factoriseSystem: ({ lowRank }) => factoriseSystem({ answers, sizes, system, machine, constants }, lowRank, variant),
    factoriseSchur: once(() => factoriseSchur({ answers, sizes, system, machine, constants })),
    multigridOn: (block) => {
      const scalarSweeps = variant.multigrid === "aggregation" ? constants.aggregationSweeps : constants.multigridSweeps;
      const scalar = { kind: variant.multigrid, sweeps: scalarSweeps };
      const velocity = { unknowns: system.velocityUnknowns, nonzeros: system.velocityNonzeros };
      const blocks = {
        schur: { name: "the Schur complement", unknowns: system.pressureUnknowns, nonzeros: system.schurNonzeros, ...scalar },
        multipliers: { name: "the face multipliers", unknowns: multipliers.unknowns, nonzeros: multipliers.nonzeros, ...scalar },
        augmented: { name: "the augmented block", ...velocity, kind: "aggregation", sweeps: constants.aggregationSweeps },
        auxiliary: { name: "the auxiliary spaces", ...velocity, kind: "classical", sweeps: constants.auxiliarySweeps },
      } as const;
      return multigridCost(blocks[block], machine, constants);
    },
    iterations: iterationCounts({ answers, sizes, constants, interval, variant }),
    residualLag: (norm) => residualLag(norm, { answers, sizes, constants }),
    iterationSeconds: ({ nonzeros, unknowns, vectors, reductions }) => {
      const bytes = 12 * nonzeros + 8 * unknowns * vectors;
      const halo = machine.cores > 1 ? 6 * machine.latencySeconds : 0;
      return machine.streamSeconds(bytes, bytes) + halo + reductions * machine.reductionSeconds();
    },
    subdomains: (kind) => subdomainCost(kind, { answers, sizes, system, machine, constants }),
    storageBytes: (nonzeros, unknowns, vectors) => 12 * nonzeros * constants.matrixCopies + 8 * unknowns * vectors,
    streamSeconds: (bytes) => machine.streamSeconds(bytes, bytes),
  };
}

export type KitCase = { answers: Answers; sizes: Sizes; system: CostKit["system"]; machine: MachineModel; constants: ModelConstants };

/** What is solved for once prescribed boundary fluxes are out. Nonzeros shrink in proportion to their unknowns. */
function activeSystem(sizes: Sizes): CostKit["system"] {
  const velocityUnknowns = sizes.velocityUnknowns - sizes.eliminatedVelocityUnknowns;
  const kept = velocityUnknowns / sizes.velocityUnknowns;
  const velocityNonzeros = sizes.nonzeros.velocityBlock * kept;
  return {
    unknowns: velocityUnknowns + sizes.pressureUnknowns,
    velocityUnknowns,
    pressureUnknowns: sizes.pressureUnknowns,
    nonzeros: velocityNonzeros + 2 * sizes.nonzeros.divergenceBlock * kept,
    velocityNonzeros,
    schurNonzeros: sizes.schurNonzeros,
  };
}

/** Multipliers: the face moments of the inner faces; each couples with all moments of the two cells of its face. */
function multiplierSystem({ boundary }: Answers, sizes: Sizes): CostKit["multipliers"] {
  const faces = boundary === "flux-everywhere" ? sizes.faces : sizes.faces - sizes.boundaryFaces;
  const unknowns = Math.max(1, faces * sizes.perFace);
  return { unknowns, nonzeros: unknowns * sizes.perFace * (2 * sizes.facesPerCell - 1) };
}

function factoriseSystem({ answers, sizes, system, machine, constants }: KitCase, lowRank: boolean, variant: Variant): DirectCost {
  const thickness = separatorThickness(variant.ordering, sizes.cells, constants);
  const perSeparatorArea = flatCutFacesOf(answers, sizes) * sizes.perFace;
  const graph = { cells: sizes.cells, perSeparatorArea, perCell: sizes.perCellVelocity + sizes.perCellPressure, perCellBorder: sizes.facesPerCell * sizes.perFace };
  const symmetric = dissect(graph, thickness);
  const tree = variant.factorisation === "lu" ? doubled(symmetric) : symmetric;
  const separator = { cells: sizes.cells, perArea: perSeparatorArea, thickness };
  return directCost({ name: "the saddle-point matrix", unknowns: system.unknowns, nonzeros: system.nonzeros, tree, separator }, machine, constants, lowRank);
}

/** Minimum-fill orderings find separators that are thicker, the more so the larger the mesh. */
function separatorThickness(ordering: Variant["ordering"], cells: number, constants: ModelConstants): number {
  if (ordering === "nested-dissection") return constants.separatorThickness;
  return Math.max(constants.separatorThickness, constants.minimumFillThickness * (cells / 1000) ** constants.minimumFillGrowth);
}

/** LU stores and eliminates both triangles. */
function doubled(tree: FrontTree): FrontTree {
  const levels = tree.levels.map((level) => ({ ...level, entries: 2 * level.entries, flops: 2 * level.flops }));
  return { entries: 2 * tree.entries, flops: 2 * tree.flops, levels };
}

/**
 * The Schur complement's graph has cells for nodes: a separator is a layer of cells, or, where pressures have nodes on the faces, those of the faces of
 * a flat cut.
 */
function factoriseSchur({ answers, sizes, system, machine, constants }: KitCase): DirectCost {
  const layer = cellsInLayerOf(answers, sizes) * sizes.perCellPressure;
  const nodal = flatCutFacesOf(answers, sizes) * couplingPerFace(answers.discretisation, answers.degree);
  const perSeparatorArea = answers.discretisation === "vem-mixed" ? layer : Math.min(layer, nodal);
  const graph = { cells: sizes.cells, perSeparatorArea, perCell: sizes.perCellPressure, perCellBorder: (sizes.facesPerCell / 2) * sizes.perCellPressure };
  const thickness = constants.schurSeparatorThickness;
  const separator = { cells: sizes.cells, perArea: perSeparatorArea, thickness };
  const matrix = { name: "the Schur complement", unknowns: system.pressureUnknowns, nonzeros: system.schurNonzeros, tree: dissect(graph, thickness), separator };
  return directCost(matrix, machine, constants, false);
}

function once<T>(compute: () => T): () => T {
  let value: { held: T } | null = null;
  return () => (value ??= { held: compute() }).held;
}
