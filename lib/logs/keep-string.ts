const poolLimit = 2_000;
const pool = new Map<string, string>();

/**
 * A copy of a piece of a line that may be kept. Engines store a piece as a view of the text it was cut from, so keeping
 * ten characters would keep the whole block of the log alive. Words that come again share one copy.
 */
export function keepString(piece: string): string {
  const known = pool.get(piece);
  if (known !== undefined) return known;
  const copy = piece.split("").join("");
  if (pool.size < poolLimit && copy.length <= 64) pool.set(copy, copy);
  return copy;
}
