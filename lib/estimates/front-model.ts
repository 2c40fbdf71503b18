/**
 * Nested dissection of a box of N cells, and the dense fronts of a multifrontal factorisation on it.
 *
 * Lengths in cells: the box has sides N^(1/3). Each level halves every box across its next direction. The separator carries w unknowns per unit
 * of area (of N^(2/3) cells); for a graph whose separators are faces w = s d, with s the faces that a flat cut crosses per N^(2/3) cells and d the
 * unknowns of a face; for a graph of cells w = (cells in a separating layer) x (unknowns of a cell). Orderings find separators thicker than the
 * flat cut by a factor t (fitted). At level l there are 2^l fronts with
 *
 *   p = t w a             pivots, a the area of the separator,
 *   b = t w (border)      rows that remain: the box's sides that earlier cuts made. After m_i halvings in direction i a share 1 - 2^-m_i of the sides
 *                         across it are cuts, the others lie on the domain's boundary.
 *
 * An LDLᵀ front stores p^2/2 + p b entries and costs p^3/3 + p^2 b + p b^2 flops (one multiply and one add each). The sums grow as N^(4/3) and N^2:
 * George, SIAM J. Numer. Anal. 10(2), 1973; Lipton, Rose & Tarjan, SIAM J. Numer. Anal. 16(2), 1979. The unknowns inside a cell meet its own faces only and are eliminated there:
 * N fronts with c pivots and f d rows.
 */
export type FrontTree = {
  entries: number;
  flops: number;
  /** Fronts from the root down; the last level holds the eliminations inside cells. */
  levels: FrontLevel[];
};

export type FrontLevel = { fronts: number; pivots: number; border: number; entries: number; flops: number };

export type DissectedGraph = {
  cells: number;
  /** Unknowns of a separator per N^(2/3) cells, for the flat cut. */
  perSeparatorArea: number;
  /** Unknowns eliminated inside a cell, and unknowns of its own border. */
  perCell: number;
  perCellBorder: number;
};

/** The tree of fronts of an LDLᵀ factorisation; LU stores and costs twice as much. */
export function dissect(graph: DissectedGraph, separatorThickness: number): FrontTree {
  const levels: FrontLevel[] = [];
  let entries = 0;
  let flops = 0;
  const add = (fronts: number, pivots: number, border: number) => {
    const level = frontLevel(fronts, pivots, border);
    levels.push(level);
    entries += level.entries;
    flops += level.flops;
  };
  const side = Math.cbrt(graph.cells);
  const width = separatorThickness * graph.perSeparatorArea;
  const depth = Math.ceil(Math.log2(Math.max(1, graph.cells)));
  const sides = [side, side, side];
  const cutShare = [0, 0, 0];
  for (let level = 0; level < depth; level += 1) {
    const across = level % 3;
    const [x = side, y = side, z = side] = sides;
    const areas = [y * z, x * z, x * y];
    const border = areas.reduce((sum, area, direction) => sum + 2 * area * (cutShare[direction] ?? 0), 0);
    add(2 ** level, width * (areas[across] ?? 0), width * border);
    sides[across] = (sides[across] ?? side) / 2;
    cutShare[across] = (1 + (cutShare[across] ?? 0)) / 2;
  }
  add(graph.cells, graph.perCell, graph.perCellBorder);
  return { entries, flops, levels };
}

function frontLevel(fronts: number, pivots: number, border: number): FrontLevel {
  return {
    fronts,
    pivots,
    border,
    entries: fronts * pivots * (pivots / 2 + border),
    flops: fronts * pivots * (pivots * (pivots / 3 + border) + border * border),
  };
}
