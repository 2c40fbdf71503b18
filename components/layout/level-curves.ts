/** A polyline as x, y pairs. */
export type Curve = readonly (readonly [number, number])[];

/**
 * The level curves x² - y² = level inside the square |x|, |y| <= 1, as polylines whose ends lie on the square's edge.
 * Each level in (-1, 1) gives two branches: hyperbolas x = ±√c cosh t, y = √c sinh t (and mirrored for c < 0), or the two
 * diagonals for level 0. Throws a RangeError for a level outside (-1, 1), which the square does not hold.
 */
export function levelCurves(level: number, segments = 24): Curve[] {
  if (!(level > -1 && level < 1)) throw new RangeError(`Level ${level} lies outside (-1, 1).`);
  if (level === 0) {
    return [
      [
        [-1, -1],
        [1, 1],
      ],
      [
        [-1, 1],
        [1, -1],
      ],
    ];
  }
  const vertex = Math.sqrt(Math.abs(level));
  const end = Math.acosh(1 / vertex);
  const branch: [number, number][] = [];
  for (let step = 0; step <= segments; step += 1) {
    const t = end * ((2 * step) / segments - 1);
    branch.push([vertex * Math.cosh(t), vertex * Math.sinh(t)]);
  }
  const right: Curve = level > 0 ? branch : branch.map(([x, y]) => [y, x] as const);
  return [right, right.map(([x, y]) => [-x, -y] as const)];
}

/** SVG path data of curves, scaled from the unit square to a box of half-width `half` about (cx, cy), y upwards. */
export function curvePath(curves: readonly Curve[], half: number, cx: number, cy: number): string {
  return curves
    .map((curve) => curve.map(([x, y], index) => `${index === 0 ? "M" : "L"}${round(cx + half * x)} ${round(cy - half * y)}`).join(""))
    .join("");
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}
