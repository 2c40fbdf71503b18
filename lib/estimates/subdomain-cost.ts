import { flatCutFacesOf } from "@/lib/sizes/compute-sizes";
import type { DirectCost } from "@/lib/strategies/cost";
import { directCost, type FactorisedMatrix } from "./direct-cost";
import { dissect } from "./front-model";
import { machineModel } from "./machine-model";
import type { KitCase } from "./make-kit";

/** Overlap of two layers of cells on each side, relative to the subdomain's cells, is held below this growth. */
const mostOverlap = 8;

/**
 * One subdomain a core (eight at least), each factorised by its own core, and a coarse problem with a handful of unknowns a subdomain, factorised by all.
 * Local: the front model on the subdomain's cells, with overlap for Schwarz on the Schur complement, the saddle-point system for BDDC. The coarse
 * problem is a box of subdomains: its separators are what limits the method on very many cores.
 */
export function subdomainCost(kind: "bddc" | "schwarz", { answers, sizes, system, machine, constants }: KitCase): DirectCost {
  const subdomains = Math.max(8, machine.cores);
  const cells = Math.max(1, sizes.cells / subdomains);
  const local = kind === "schwarz" ? Math.min(mostOverlap * cells, (Math.cbrt(cells) + 2) ** 3) : cells;
  const pressure = kind === "schwarz";
  const perArea = pressure ? sizes.perCellPressure : flatCutFacesOf(answers, sizes) * sizes.perFace;
  const perCell = sizes.perCellPressure + (pressure ? 0 : sizes.perCellVelocity);
  const perCellBorder = pressure ? 3 * sizes.perCellPressure : sizes.facesPerCell * sizes.perFace;
  const thickness = constants.separatorThickness;
  const share = local / sizes.cells;
  const single = machineModel({ ...answers.hardware, cores: 1, nodes: 1 }, constants);
  const subdomain = {
    name: "a subdomain",
    unknowns: (pressure ? system.pressureUnknowns : system.unknowns) * share,
    nonzeros: (pressure ? system.schurNonzeros : system.nonzeros) * share,
    tree: dissect({ cells: local, perSeparatorArea: perArea, perCell, perCellBorder }, thickness),
    separator: { cells: local, perArea, thickness },
  };
  const each = directCost(subdomain, single, constants, false);
  const coarse = directCost(coarseProblem(subdomains, thickness), machine, constants, false);
  const rounds = subdomains / machine.cores;
  return {
    entries: each.entries * subdomains + coarse.entries,
    flops: each.flops * subdomains + coarse.flops,
    analysisSeconds: each.analysisSeconds * rounds + coarse.analysisSeconds,
    factorSeconds: each.factorSeconds * rounds + coarse.factorSeconds,
    solveSeconds: each.solveSeconds * rounds + coarse.solveSeconds,
    memoryBytes: each.memoryBytes * subdomains + coarse.memoryBytes,
    why: [...each.why.slice(1, 3), ...coarse.why.slice(1, 2)],
  };
}

/** Six unknowns a subdomain, coupled over its faces. */
function coarseProblem(subdomains: number, thickness: number): FactorisedMatrix {
  const tree = dissect({ cells: subdomains, perSeparatorArea: 6, perCell: 6, perCellBorder: 18 }, thickness);
  return { name: "the coarse problem", unknowns: 6 * subdomains, nonzeros: 600 * subdomains, tree, separator: { cells: subdomains, perArea: 6, thickness } };
}
