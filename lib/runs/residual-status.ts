/** How a run stands to the tolerance asked for, in the true relative residual. */
export const residualStatuses = ["verified", "not-verified", "own-test-only", "not-reached"] as const;
export type ResidualStatus = (typeof residualStatuses)[number];

export const residualTexts: Record<ResidualStatus, string> = {
  verified: "The true residual meets the tolerance.",
  "not-verified": "Residual not verified: no true residual was recorded.",
  "own-test-only": "Met only the residual it monitors: its true residual is above 10 times the tolerance, so it is not a success.",
  "not-reached": "Did not converge.",
};
