import type { Answers } from "@/lib/questionnaire/answers";
import type { Sizes } from "@/lib/sizes/sizes";
import type { AccuracyClass } from "@/lib/strategies/cost";

/** Factors by which the median is divided and multiplied for an 80 % range. */
export type Spreads = { iterations: number; memory: number; setup: number; solve: number };

/**
 * 80 % spreads of each class of models: the factor within which 80 % of the reference runs lie (the tests compute them again). Memory of the multigrid classes
 * was measured too seldom to tell apart. Theory alone: a factor 3 in time.
 */
export const measuredSpreads: Record<AccuracyClass, Spreads> = {
  direct: { iterations: 1, memory: 1.2, setup: 1.4, solve: 1.9 },
  "block-diagonal": { iterations: 1.28, memory: 1.45, setup: 2, solve: 1.8 },
  "block-factorised": { iterations: 1.28, memory: 1.6, setup: 1.9, solve: 1.6 },
  regularised: { iterations: 1.25, memory: 1.6, setup: 2, solve: 2 },
  hybridised: { iterations: 1.6, memory: 1.6, setup: 1.4, solve: 2 },
  auxiliary: { iterations: 1.1, memory: 1.6, setup: 1.4, solve: 1.3 },
  theory: { iterations: 2, memory: 1.8, setup: 2.5, solve: 3 },
};

/** The spreads at this case: wider where the reference runs do not reach. */
export function spreadsFor(accuracy: AccuracyClass, answers: Answers, sizes: Sizes): Spreads {
  const base = measuredSpreads[accuracy];
  const beyond = extrapolation(answers, sizes);
  return {
    iterations: accuracy === "direct" ? 1 : base.iterations ** beyond.iterations,
    memory: base.memory ** beyond.memory,
    setup: base.setup ** beyond.time,
    solve: base.solve ** beyond.time,
  };
}

/** Exponents of the spreads. Reference runs: 1 and 2 cores, to 570 000 unknowns, degrees 1 to 3, tetrahedra and hexahedra. */
function extrapolation(answers: Answers, sizes: Sizes): { iterations: number; memory: number; time: number } {
  const otherElement = answers.discretisation === "vem-mixed" ? 0.5 : 0;
  const otherDegree = Math.max(0, answers.degree - 3) * 0.15;
  const decades = Math.max(0, Math.log10(sizes.unknowns / 5e5)) * 0.15;
  const doublings = Math.max(0, Math.log2(answers.hardware.cores / 2)) * 0.05;
  return { iterations: 1 + otherElement + otherDegree, memory: 1 + decades + doublings, time: 1 + otherElement / 2 + otherDegree + decades + doublings };
}
