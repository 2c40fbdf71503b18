import { constants, constantSources, fittedConstants } from "@/lib/estimates/constants";
import { estimateAll } from "@/lib/estimates/estimate-all";
import { modelVersion } from "@/lib/estimates/model-version";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { caseAnswers } from "@/tests/support/case-answers";
import { holds, mustHoldFigures, type Figure } from "@/tests/reference/estimates/harness/must-hold";

/** Prints every figure that the estimates are held to, with its threshold; exit code 1 when one fails. `--constants` lists the constants too. */
function main(): void {
  const figures = mustHoldFigures();
  console.log(`Estimates, model ${modelVersion}, against the reference runs`);
  for (const figure of figures) console.log(`${holds(figure) ? "holds " : "FAILS "} ${figure.value.toPrecision(4).padStart(9)}  ${threshold(figure).padEnd(16)} ${figure.name}`);
  console.log(`Constants: ${Object.keys(fittedConstants).length} fitted, ${Object.keys(constants).length - Object.keys(fittedConstants).length} of practice`);
  if (process.argv.includes("--constants")) printConstants();
  console.log(`All eleven estimates of the default case: ${millisecondsOfAll().toPrecision(3)} ms (fastest of 20 batches of 50)`);
  const failed = figures.filter((figure) => !holds(figure)).length;
  console.log(`${figures.length - failed} hold, ${failed} fail`);
  process.exitCode = failed > 0 ? 1 : 0;
}

function threshold({ lowest, highest }: Figure): string {
  if (lowest === -Infinity) return `<= ${highest}`;
  return highest === Infinity ? `>= ${lowest}` : `${lowest} .. ${highest}`;
}

function printConstants(): void {
  for (const [name, { unit, from }] of Object.entries(constantSources)) {
    const value = Object.entries(constants).find(([key]) => key === name)?.[1];
    console.log(`  ${name} = ${value} ${unit}: ${from}`);
  }
}

function millisecondsOfAll(): number {
  const answers = caseAnswers();
  const sizes = computeSizes(answers);
  let fastest = Infinity;
  for (let batch = 0; batch < 20; batch += 1) {
    const start = performance.now();
    for (let call = 0; call < 50; call += 1) estimateAll(answers, sizes);
    fastest = Math.min(fastest, (performance.now() - start) / 50);
  }
  return fastest;
}

main();
