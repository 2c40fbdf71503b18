/**
 * Direct settings of the options file against the library's defaults: CPU seconds of set-up and one solve, the median over
 * rounds in which both run in turn. Prints a table; exits 1 when any system is more than 10 % slower or the median is not 1.5 times faster.
 * Run: npx tsx scripts/bench/options.ts (needs Debian's python3-petsc4py).
 */
import { options } from "@/lib/strategies/direct-ldlt/options";
import { directSystems, type DirectSystem } from "@/tests/support/petsc/direct-systems";
import { runPetscAll } from "@/tests/support/petsc/run-petsc";

const defaults = "-ksp_type preonly\n-pc_type cholesky\n-pc_factor_mat_solver_type mumps\n";
const slowest = 1 / 1.1;
const typical = 1.5;

type Line = { name: string; unknowns: number; defaultSeconds: number; ourSeconds: number; ratio: number; residual: number };

/** Both run in turn, several rounds; the ratio is the median over the rounds, so that a busy moment of the machine does not decide. */
function compare({ name, system, context, repeat }: DirectSystem): Line {
  const file = options(context);
  if (file.kind !== "petsc" || file.callingLines === null) throw new Error("The direct strategy has no options file.");
  const { text, callingLines } = file;
  const pair = [
    { system, options: defaults, callingLines, repeat },
    { system, options: text, callingLines, repeat },
  ];
  const results = runPetscAll(Array.from({ length: repeat >= 5 ? 9 : 3 }, () => pair).flat());
  const seconds = (parity: number) => results.filter((_, index) => index % 2 === parity).map((one) => (one.reason > 0 ? one.cpuSeconds : Infinity));
  const [plain, ours] = [seconds(0), seconds(1)];
  const ratio = median(plain.map((value, round) => value / (ours[round] ?? Infinity)));
  const residual = Math.max(...results.map((one, index) => (index % 2 === 1 ? one.trueRelativeResidual : 0)));
  return { name, unknowns: context.sizes.unknowns, defaultSeconds: median(plain), ourSeconds: median(ours), ratio, residual };
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}

const lines: Line[] = [];
for (const system of directSystems(1e-8)) {
  const line = compare(system);
  lines.push(line);
  console.log(
    `${line.name.padEnd(40)} defaults ${line.defaultSeconds.toFixed(4).padStart(9)} s   ours ${line.ourSeconds.toFixed(4).padStart(9)} s   ` +
      `${line.ratio.toFixed(2).padStart(6)}x   true residual ${line.residual.toExponential(1)}`,
  );
}
const worst = Math.min(...lines.map((line) => line.ratio));
const middle = median(lines.map((line) => line.ratio));
console.log(`Direct settings: worst ${worst.toFixed(2)}x (at least ${slowest.toFixed(2)}x), median ${middle.toFixed(2)}x (at least ${typical}x) over ${lines.length} systems.`);
process.exitCode = worst >= slowest && middle >= typical ? 0 : 1;
