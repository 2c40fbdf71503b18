import { describe, it } from "vitest";
import { options as directBlr } from "@/lib/strategies/direct-blr/options";
import { options as directLdlt } from "@/lib/strategies/direct-ldlt/options";
import { options as schurDiagAmg } from "@/lib/strategies/schur-diag-amg/options";
import { options as schurDiagDirect } from "@/lib/strategies/schur-diag-direct/options";
import { options as schurTriangular } from "@/lib/strategies/schur-triangular/options";
import { options as schwarzTwoLevel } from "@/lib/strategies/schwarz-two-level/options";
import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import { measuredContext, measuredSystems, rightHandSides } from "./cases";
import { expectSolves, type Solve } from "./expect-solves";

/** Strategies whose preconditioner PETSc forms from K alone, with parameters to try. Oracle: PETSc 3.18.5 from Debian. */
const fromMatrixAlone: readonly { id: string; write: (context: OptionsContext) => OptionsFile; parameters: Record<string, number | string> }[] = [
  { id: "direct-ldlt", write: directLdlt, parameters: {} },
  { id: "direct-blr", write: directBlr, parameters: {} },
  { id: "schur-diag-direct", write: schurDiagDirect, parameters: {} },
  { id: "schur-diag-amg", write: schurDiagAmg, parameters: {} },
  { id: "schur-diag-amg", write: schurDiagAmg, parameters: { amgPackage: "gamg" } },
  { id: "schur-triangular", write: schurTriangular, parameters: {} },
  { id: "schur-triangular", write: schurTriangular, parameters: { factorisation: "lower" } },
  { id: "schwarz-two-level", write: schwarzTwoLevel, parameters: { subdomains: 4 } },
];

describe("options files that need no matrix but K", () => {
  it.each(fromMatrixAlone)("$id $parameters reaches the true residual on every measured system and leaves no option", ({ write, parameters }) => {
    const solves: Solve[] = measuredSystems.flatMap((system) =>
      rightHandSides(system, parameters).map((rhs) => ({
        name: `${system.name} ${rhs}`,
        system: { kind: "files", name: system.name, rhs },
        context: measuredContext(system, 1e-8, parameters),
      })),
    );
    expectSolves(write, solves);
  }, 300_000);
});
