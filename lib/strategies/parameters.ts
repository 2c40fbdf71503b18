import { advisedGamma } from "./regularisation";
import type { ParameterDefinition } from "./strategy";

export const gammaParameter: ParameterDefinition = {
  name: "gamma",
  label: "γ, weight of the augmentation",
  unit: "h² / ν",
  help: "Proportional to h²: halve the spacing and γ falls to a quarter. Written with γ⁻¹ in front the same optimum grows.",
  default: (context) => advisedGamma(context).value,
  range: [1e-30, 1e30],
};

export const monitoredToleranceParameter: ParameterDefinition = {
  name: "monitoredTolerance",
  label: "Tolerance in the monitored norm",
  unit: "",
  help: "Tighter than the tolerance asked for, by as much as the true residual lags the preconditioned one on this mesh.",
  default: ({ answers }) => answers.tolerance,
  range: [1e-15, 1e-2],
};
