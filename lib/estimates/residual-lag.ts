import type { Answers } from "@/lib/questionnaire/answers";
import type { Sizes } from "@/lib/sizes/sizes";
import type { CostKit, ResidualLag } from "@/lib/strategies/cost";
import type { ModelConstants } from "./constants";

/**
 * How far the true relative residual lags behind the one that MINRES monitors, |r| in the P^-1 norm: a factor that grows as h^-2 with h relative to the
 * domain (the two blocks of P scale apart as the mesh is refined). With prescribed fluxes contrasts up to 1e4 leave it, beyond it grows; with a pressure boundary it
 * starts ten times smaller and grows with the contrast. Fitted to runs with wells; a random right-hand side at contrast 1e4 was far worse, see the notes.
 */
export function residualLag(
  kind: Parameters<CostKit["residualLag"]>[0],
  { answers, sizes, constants }: { answers: Answers; sizes: Sizes; constants: ModelConstants },
): ResidualLag {
  const open = answers.boundary === "pressure-somewhere";
  const contrast = answers.contrast.ratio;
  const atContrast = open ? constants.lagPressure * contrast ** constants.lagPressureContrast : Math.max(1, contrast / 1e4) ** constants.lagFluxContrast;
  const factors = {
    "block-diagonal": (answers.degree === 1 ? constants.lagLow : constants.lagHigh) * atContrast,
    regularised: constants.lagRegularised,
    auxiliary: open ? constants.lagRegularised : constants.lagAuxiliary,
    condensed: constants.lagCondensed,
  };
  const lag = Math.max(1, Math.min(1e9, factors[kind] * sizes.cells ** (2 / 3)));
  const monitoredTolerance = Math.max(1e-15, answers.tolerance / lag);
  return {
    lag,
    monitoredTolerance,
    why: {
      quantity: "Tolerance of the monitored norm",
      formula: "tolerance / (c h^-2 g(contrast, boundary)), h relative to the domain",
      inputs: [
        { name: "tolerance of the true residual", value: answers.tolerance, unit: "" },
        { name: "lag of the true residual", value: lag, unit: "" },
      ],
      value: monitoredTolerance,
      unit: "",
      source: "Fitted to true and monitored residuals of the reference runs",
    },
  };
}
