import type { StrategyId } from "@/lib/shared/strategy-ids";
import { lineOf, numberOf, wordOf, type SolverView, type ViewNode } from "@/lib/logs/solver-view";

export type RecognisedStrategy = { strategy: StrategyId; line: number; note: string | null };

const directTypes = new Set(["lu", "cholesky"]);
const saddlePointKrylov = new Set(["minres", "gmres", "fgmres", "lgmres", "dgmres", "pgmres", "gcr", "symmlq", "bcgs", "bcgsl", "tfqmr"]);

/** A sub-solver applied exactly once: the block of a preconditioner, not a nested iteration. */
type Block = { krylov: ViewNode; pc: ViewNode };

function blocksOf(pc: ViewNode, roles: readonly ViewNode["role"][]): Block[] {
  const found: Block[] = [];
  for (const [index, child] of pc.children.entries()) {
    const next = pc.children[index + 1];
    if (child.kind !== "KSP" || !roles.includes(child.role) || next === undefined) continue;
    if (next.kind === "PC" && next.prefix === child.prefix) found.push({ krylov: child, pc: next });
  }
  return found;
}

function factorOf(pc: ViewNode): ViewNode | null {
  const factors = pc.children.filter((child) => child.kind === "Mat" && child.role === "factor");
  return factors.length === 1 ? (factors[0] ?? null) : null;
}

function appliedOnce(block: Block): boolean {
  return block.krylov.type.value === "preonly";
}

function isMultigrid(pc: ViewNode): boolean {
  const type = pc.type.value;
  return type === "gamg" || type === "ml" || (type === "hypre" && wordOf(pc, "hypre") === "boomeramg");
}

/** The factored matrices that the strategy itself holds: of the whole system, or of the blocks of a field split. */
export function heldFactors(view: SolverView): ViewNode[] {
  const pc = view.preconditioner;
  if (pc === null) return [];
  const owners = [pc, ...blocksOf(pc, ["split", "velocity-solver", "schur-solver"]).map((block) => block.pc)];
  return owners.flatMap((owner) => (directTypes.has(owner.type.value ?? "") ? (factorOf(owner) ?? []) : []));
}

/** Whether block low-rank compression was on, off, or left open by what MUMPS printed. */
function lowRank(factor: ViewNode): "on" | "off" | "open" {
  const asked = numberOf(factor, "ICNTL(35)");
  const entries = numberOf(factor, "INFOG(29)");
  const compressed = numberOf(factor, "INFOG(35)");
  const estimate = numberOf(factor, "INFOG(36)");
  if (asked !== null && asked >= 1 && asked <= 3) return "on";
  if (estimate !== null && estimate > 0) return "on";
  if (asked === 0) return "off";
  // Fewer entries than uncompressed, yet no memory estimated for compression: one of the two is damaged.
  if (compressed !== null && entries !== null && compressed < entries) return "open";
  if (compressed !== null && estimate === 0) return "off";
  // MUMPS before 5.1 has no low-rank factorisation and prints no INFOG(35).
  return compressed === null && estimate === null && numberOf(factor, "INFOG(34)") !== null ? "off" : "open";
}

function recogniseDirect(view: SolverView, pc: ViewNode): RecognisedStrategy | null {
  const factor = factorOf(pc);
  const used = wordOf(factor, "package");
  if (!view.complete || factor === null || used === null || used === "strumpack") return null;
  const line = pc.type.line ?? pc.line;
  const lu = "The log shows an LU factorisation; it is counted as direct LDLᵀ, the strategy of every sparse direct solve.";
  const note = pc.type.value === "lu" ? lu : null;
  if (used !== "mumps") return { strategy: "direct-ldlt", line, note };
  const compression = lowRank(factor);
  if (compression === "open") return null;
  return compression === "on"
    ? { strategy: "direct-blr", line: lineOf(factor, "ICNTL(35)") ?? lineOf(factor, "INFOG(36)") ?? line, note: null }
    : { strategy: "direct-ldlt", line, note };
}

function systemMatrices(pc: ViewNode): ViewNode[] {
  return pc.children.filter((child) => child.kind === "Mat" && child.role === "system");
}

/**
 * How the block of the preconditioning matrix relates to that of the system: PETSc prints the split's prefix on the
 * object the split was built from, so a (0,0) block named in the second matrix only is another matrix than A.
 */
function velocityBlock(pc: ViewNode): "system" | "replaced" | "open" {
  const [system, preconditioning] = systemMatrices(pc);
  const inSystem = wordOf(system, "block 00");
  if (system === undefined || inSystem === null) return "open";
  if (wordOf(pc, "matrices") === "one") return inSystem === "unnamed" ? "open" : "system";
  const inSecond = wordOf(preconditioning, "block 00");
  if (inSecond === null || inSecond === "unnamed" || inSecond === "none") return "open";
  return inSystem === inSecond ? "system" : inSystem === "unnamed" ? "replaced" : "open";
}

/** A Schur complement approximation couples unknowns; a diagonal one is a mass matrix. */
function couples(pc: ViewNode): boolean {
  const matrix = systemMatrices(pc).at(-1);
  const rows = numberOf(matrix, "rows");
  const nonzeros = numberOf(matrix, "nonzeros");
  return rows !== null && nonzeros !== null && nonzeros > rows;
}

function recogniseBlockDiagonal(pc: ViewNode, velocity: Block, pressure: Block): StrategyId | null {
  if (velocity.pc.type.value === "jacobi" && velocityBlock(pc) === "system" && couples(pressure.pc)) {
    if (directTypes.has(pressure.pc.type.value ?? "") && factorOf(pressure.pc) !== null) return "schur-diag-direct";
    return isMultigrid(pressure.pc) ? "schur-diag-amg" : null;
  }
  if (velocityBlock(pc) !== "replaced") return null;
  if (wordOf(velocity.pc, "hypre") === "ads") return "hdiv-auxiliary";
  if (isMultigrid(velocity.pc)) return "regularized-amg";
  return velocity.pc.type.value === "mg" ? "p-multigrid" : null;
}

function recogniseSchur(pc: ViewNode): StrategyId | null {
  const [velocity, ...moreVelocity] = blocksOf(pc, ["velocity-solver"]);
  const [pressure, ...morePressure] = blocksOf(pc, ["schur-solver"]);
  if (velocity === undefined || pressure === undefined || moreVelocity.length + morePressure.length > 0) return null;
  if (!appliedOnce(velocity) || !appliedOnce(pressure) || velocity.pc.type.value !== "jacobi") return null;
  const direct = directTypes.has(pressure.pc.type.value ?? "");
  if (pressure.pc.type.value === "hpddm") return "schwarz-two-level";
  if (!direct && !isMultigrid(pressure.pc)) return null;
  if (wordOf(pc, "factorisation") !== "DIAG") return wordOf(pc, "factorisation") === null ? null : "schur-triangular";
  return direct ? "schur-diag-direct" : "schur-diag-amg";
}

function recogniseSplit(view: SolverView, pc: ViewNode): RecognisedStrategy | null {
  const line = lineOf(pc, "composition") ?? pc.line;
  const composition = wordOf(pc, "composition");
  if (!view.complete || !saddlePointKrylov.has(view.krylov.type.value ?? "")) return null;
  if (composition === "SCHUR") return named(recogniseSchur(pc), line);
  const blocks = blocksOf(pc, ["split"]);
  const [velocity, pressure] = blocks;
  if (blocks.length !== 2 || numberOf(pc, "splits") !== 2 || velocity === undefined || pressure === undefined) return null;
  if (!appliedOnce(velocity) || !appliedOnce(pressure)) return null;
  const diagonal = recogniseBlockDiagonal(pc, velocity, pressure);
  if (composition === "ADDITIVE") return named(diagonal, line);
  const triangular = composition === "MULTIPLICATIVE" || composition === "SYMMETRIC_MULTIPLICATIVE";
  const schurPieces = diagonal === "schur-diag-direct" || diagonal === "schur-diag-amg";
  return triangular && schurPieces ? named("schur-triangular", line) : null;
}

function named(strategy: StrategyId | null, line: number): RecognisedStrategy | null {
  return strategy === null ? null : { strategy, line, note: null };
}

/**
 * The strategy a printed solver tree belongs to, null unless every piece that defines the strategy was printed.
 * Conjugate gradients with multigrid on one matrix stay unnamed: the tree does not say whether the matrix is the
 * hybridised system.
 */
export function recogniseStrategy(view: SolverView): RecognisedStrategy | null {
  const pc = view.preconditioner;
  if (pc === null || view.mixed) return null;
  const type = pc.type.value;
  if (type === null) return null;
  if (view.krylov.type.value === "fetidp" || type === "bddc") return { strategy: "bddc", line: pc.type.line ?? pc.line, note: null };
  if (directTypes.has(type)) return recogniseDirect(view, pc);
  return type === "fieldsplit" ? recogniseSplit(view, pc) : null;
}
