import { formatCount, formatGib, formatRatio, formatSeconds, formatSi } from "@/lib/shared/format";
import type { Factor, RankingEntry } from "./advice";

/** One sentence why a strategy stands where it stands, from the figures that dominate. `repeatedSolves` as in the answers. */
export function explainEntry(entry: RankingEntry, repeatedSolves: number): string {
  if (entry.status !== "ranked") return entry.reason ?? "";
  const { setupSeconds, totalSeconds } = entry.estimate;
  const setupShare = totalSeconds.median > 0 ? setupSeconds.median / totalSeconds.median : 0;
  const main = setupShare > 0.5 ? setupWords(entry) : solveWords(entry, repeatedSolves);
  const factor = dominantFactor(entry.factors);
  return factor === null ? `${main}.` : `${main}; ${factorWords(factor)}.`;
}

function setupWords({ estimate }: RankingEntry): string {
  const { setupSeconds, factorFlops, memoryGiB } = estimate;
  const work = factorFlops === null ? "" : `, a factorisation of ${formatSi(factorFlops, "flop", 2)} in ${formatGib(memoryGiB.median)}`;
  return `Most of its time is the set-up of ${formatSeconds(setupSeconds.median)}${work}`;
}

function solveWords({ estimate }: RankingEntry, repeatedSolves: number): string {
  const { solveSeconds, iterations } = estimate;
  const count = iterations.median > 1 ? ` of about ${formatCount(iterations.median)} iterations` : "";
  const solves = repeatedSolves > 1 ? `${formatCount(repeatedSolves)} solves` : "the solve";
  return `Most of its time is ${solves}${count}, ${formatSeconds(solveSeconds.median)}${repeatedSolves > 1 ? " each" : ""}`;
}

/** The factor furthest from 1, the earlier one of two; null when all are within 5 %. */
function dominantFactor(factors: readonly Factor[]): Factor | null {
  const weight = ({ factor }: Factor) => Math.abs(Math.log(factor));
  const strongest = factors.reduce<Factor | null>((found, factor) => (found === null || weight(factor) > weight(found) ? factor : found), null);
  return strongest !== null && weight(strongest) > Math.log(1.05) ? strongest : null;
}

function factorWords({ kind, rule, factor }: Factor): string {
  const who: Record<Factor["kind"], string> = { rule: `the rule ${rule ?? ""}`, evidence: "the record", priority: "the priority" };
  return factor > 1 ? `${who[kind]} makes it ${formatRatio(factor)} longer` : `${who[kind]} makes it ${formatRatio(1 / factor)} shorter`;
}
