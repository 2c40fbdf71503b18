import { proposalKinds } from "../proposal-schema";
import type { Found } from "../proposals";

/** Most proposals of one search, and most new rules among them. */
const mostProposals = 12;
const mostNewRules = 4;

export type OrderedProposal = Found & { sameCasesAs: string | null };

/**
 * Largest held-out gain first; equal gains by kind, changes of existing rules before new ones. Of ideas that mend mostly the same cases,
 * one of each kind stays (the bounds of one threshold by each rule), pointing to the strongest; new rules go where any other mends those cases.
 */
export function orderProposals(found: readonly Found[]): OrderedProposal[] {
  const ordered = found.toSorted((a, b) => b.heldOut.gain - a.heldOut.gain || proposalKinds.indexOf(a.family.kind) - proposalKinds.indexOf(b.family.kind));
  const revisionsFirst = [...ordered.filter(({ family }) => family.kind !== "new-rule"), ...ordered.filter(({ family }) => family.kind === "new-rule")];
  const kept: Found[] = [];
  for (const item of revisionsFirst) {
    const rivals = kept.filter((other) => overlaps(item, other));
    const newRule = item.family.kind === "new-rule";
    if (newRule ? rivals.length > 0 || kept.filter(({ family }) => family.kind === "new-rule").length >= mostNewRules : rivals.some(({ family }) => family.kind === item.family.kind)) continue;
    kept.push(item);
  }
  return ordered
    .filter((item) => kept.includes(item))
    .slice(0, mostProposals)
    .map((item, index, all) => ({ ...item, sameCasesAs: all.slice(0, index).find((other) => overlaps(item, other))?.family.key ?? null }));
}

/** Whether more than half of what `item` saves is on cases that `other` mends too. */
function overlaps(item: Found, other: Found): boolean {
  const mended = new Set(savedBy(other).map(({ index }) => index));
  const saved = savedBy(item);
  const all = saved.reduce((sum, { gain }) => sum + gain, 0);
  const shared = saved.reduce((sum, { index, gain }) => (mended.has(index) ? sum + gain : sum), 0);
  return shared > 0.5 * all;
}

function savedBy({ family, candidate }: Found): { index: number; gain: number }[] {
  const walk = family.walks[candidate.walk];
  if (walk === undefined) return [];
  return [...walk.cases.slice(0, candidate.count)].flatMap((index, position) => {
    const gain = walk.gains[position] ?? 0;
    return gain > 0 ? [{ index, gain }] : [];
  });
}
