/** Numeric operators, and whether a case with exactly the threshold's value belongs with the larger ones. */
const equalGoesUp = { lessThan: true, greaterThanInclusive: true, lessThanInclusive: false, greaterThan: false } as const;
export type OrderingOperator = keyof typeof equalGoesUp;

export function isOrdering(operator: string): operator is OrderingOperator {
  return Object.hasOwn(equalGoesUp, operator);
}

/**
 * A threshold that parts `below` from `above` (recorded values, below < above) under the operator, with as few digits as the gap allows,
 * near the gap's middle (geometric where both are positive). Whole facts get a whole threshold.
 */
export function thresholdBetween(below: number, above: number, operator: OrderingOperator, whole: boolean): number {
  const up = equalGoesUp[operator];
  const parts = (value: number) => (whole ? Number.isInteger(value) && (up ? value > below && value <= above : value >= below && value < above) : value > below && value < above);
  const middle = below > 0 ? Math.sqrt(below) * Math.sqrt(above) : 0.5 * (below + above);
  for (let digits = 1; digits <= 15; digits += 1) {
    const candidate = Number(middle.toPrecision(digits));
    if (parts(candidate)) return candidate;
  }
  if (!whole && parts(middle)) return middle;
  return up ? above : below;
}
