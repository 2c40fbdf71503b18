import type { CostStep } from "./cost";
import type { StrategyContext } from "./strategy";

/**
 * c of gamma = c h^2 / nu_ref at degree 1, h = (volume / cells)^(1/3), A + gamma Bᵀ W^-1 B with W the unweighted pressure mass matrix: in the middle of the
 * flat valleys of the gamma sweeps among the reference runs. Above degree 1 the mesh resolves as one of h / k and the valleys lie lower: c / k.
 */
export const advisedGammaOverH2 = 0.4;

/** The advised weight and its multiple of h^2 / nu_ref. */
export function advisedGamma({ answers, sizes }: StrategyContext): { value: number; overH2: number } {
  const overH2 = advisedGammaOverH2 / answers.degree;
  return { value: (overH2 * sizes.spacing ** 2) / answers.coefficientScale, overH2 };
}

/** The step that explains it. */
export function gammaStep(context: StrategyContext): CostStep {
  const { value, overH2 } = advisedGamma(context);
  return {
    quantity: "gamma of A + gamma Bᵀ W^-1 B",
    formula: "c h^2 / nu_ref",
    inputs: [
      { name: "c", value: overH2, unit: "" },
      { name: "h", value: context.sizes.spacing, unit: "length" },
      { name: "nu_ref", value: context.answers.coefficientScale, unit: "coefficient" },
    ],
    value,
    unit: "length^2 / coefficient",
    source: "Flat of the gamma sweeps among the reference runs",
  };
}
