/**
 * Direct settings of the options file against the library's defaults: CPU seconds of set-up and one solve, the least of several repeats, both
 * in one run. Prints a table; exits 1 when any system is more than 10 % slower or the median is not 1.5 times faster.
 * Run: npx tsx scripts/bench/options.ts (needs Debian's python3-petsc4py).
 */
import { options } from "@/lib/strategies/direct-ldlt/options";
import { directSystems, type DirectSystem } from "@/tests/support/petsc/direct-systems";
import { runPetscAll } from "@/tests/support/petsc/run-petsc";

const defaults = "-ksp_type preonly\n-pc_type cholesky\n-pc_factor_mat_solver_type mumps\n";
const slowest = 1 / 1.1;
const typical = 1.5;

type Line = { name: string; unknowns: number; defaultSeconds: number; ourSeconds: number; ratio: number; residual: number };

/** Both run in turn, three times, so that a busy machine slows both; the least of all repeats counts. */
function compare({ name, system, context, repeat }: DirectSystem): Line {
  const file = options(context);
  if (file.kind !== "petsc" || file.callingLines === null) throw new Error("The direct strategy has no options file.");
  const { text, callingLines } = file;
  const pair = [
    { system, options: defaults, callingLines, repeat },
    { system, options: text, callingLines, repeat },
  ];
  const results = runPetscAll([...pair, ...pair, ...pair]);
  const least = (parity: number) => Math.min(...results.map((one, index) => (index % 2 === parity && one.reason > 0 ? one.cpuSeconds : Infinity)));
  const [defaultSeconds, ourSeconds] = [least(0), least(1)];
  const ratio = defaultSeconds / ourSeconds;
  const residual = Math.max(...results.map((one, index) => (index % 2 === 1 ? one.trueRelativeResidual : 0)));
  return { name, unknowns: context.sizes.unknowns, defaultSeconds, ourSeconds, ratio, residual };
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
