import { keepString } from "@/lib/logs/keep-string";

const number = String.raw`(\d+(?:\.\d+)?(?:e[+-]\d{2,3})?|[+-]?(?:nan|inf))`;
const trueResidual = new RegExp(String.raw`^(?:final )?true relative residual(?: norm)?(?: \|\|b ?- ?[AK] ?\*? ?x\|\| ?/ ?\|\|b\|\|)? *[=:] *${number}$`, "i");
const residualRatio = new RegExp(String.raw`^\|\|b ?- ?[AK] ?\*? ?x\|\| ?/ ?\|\|b\|\| *[=:] *${number}$`, "i");
const peakMemory = /^Maximum \(over computational time\) process memory: +total (\d\.\d{4}e[+-]\d{2,3}) +max (\d\.\d{4}e[+-]\d{2,3}) +min /;
const strategyLine = /^#? ?Saddlemark strategy: ([a-z-]{3,40})$/;

/** `True relative residual ||b-Kx||/||b|| = 1.0e-07` as programs print it; NaN for nan, null for other lines. */
export function readTrueResidual(text: string): number | null {
  const first = text.charCodeAt(0) | 32;
  // t, f or a bar (the bar has the bit set already).
  if (first !== 116 && first !== 102 && first !== 124) return null;
  const match = trueResidual.exec(text) ?? residualRatio.exec(text);
  if (match === null) return null;
  const value = Number(match[1]);
  return Number.isFinite(value) ? value : Number.NaN;
}

/** Largest process memory of a run in bytes, summed over the processes, as `-memory_view` prints it. */
export function readPeakMemory(text: string): number | null {
  const match = peakMemory.exec(text);
  return match === null ? null : Number(match[1]);
}

/**
 * The name of a strategy as a job script prints it (`echo "# Saddlemark strategy: schur-diag-amg"`), for strategies
 * whose solver tree does not identify them.
 */
export function readStrategyLine(text: string): string | null {
  const name = strategyLine.exec(text)?.[1];
  return name === undefined ? null : keepString(name);
}
