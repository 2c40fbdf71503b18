import type { OptionsContext, StrategyContext } from "@/lib/strategies/strategy";
import { choiceParameter, krylovMethods, positiveParameter, advisedRestart, residualTests, type KrylovMethod } from "./parameters";
import { shortNumber, type OptionLine, type Section } from "./write-options-file";

/** Krylov part of a file and the prefix under which its preconditioner's options stand. */
export type KrylovPart = { section: Section; prefix: string };

/**
 * Expected ratio of the true relative residual to the preconditioned one that MINRES tests, both relative to their start: 0.1 / h^2 at
 * lowest order and 3 / h^2 above, h in units of the domain's width (envelope of the reference runs with flux boundary and
 * contrast up to 1e4; at 1e6, with a pressure boundary, up to 1e5 was measured).
 */
export function residualLag({ answers, sizes }: StrategyContext): number {
  const relativeSpacing = sizes.spacing / Math.cbrt(answers.domainVolume);
  return Math.max(10, (answers.degree === 1 ? 0.1 : 3) / relativeSpacing ** 2);
}

/** Whether a fixed tightening of the tolerance can't be trusted to reach the true residual. */
export function residualThreatened(context: StrategyContext): boolean {
  const { answers } = context;
  const contrastLimit = answers.boundary === "pressure-somewhere" ? 10 : 100;
  const scaled = answers.coefficientScale < 1e-2 || answers.coefficientScale > 1e2;
  const stretched = answers.anisotropy > 100 || answers.aspectRatio > 10;
  const lag = residualLag(context);
  return answers.contrast.ratio > contrastLimit || scaled || stretched || lag > 1000 || answers.tolerance / lag < 1e-13;
}

/**
 * Krylov options for a symmetric positive definite preconditioner of the saddle-point matrix.
 * `alwaysGuarded`: for preconditioners whose lag is larger than `residualLag` tells.
 */
export function symmetricKrylov(context: OptionsContext, alwaysGuarded = false): KrylovPart {
  const method = choiceParameter(context, "krylovMethod", krylovMethods, "minres");
  if (method !== "minres") return { section: longRecurrence(context, method), prefix: "" };
  const asked = choiceParameter(context, "residualTest", residualTests, "automatic");
  const needsGuard = asked === "guarded" || (asked === "automatic" && (alwaysGuarded || residualThreatened(context)));
  return needsGuard ? guardedMinres(context) : plainMinres(context);
}

/** Flexible GMRES (or GMRES from the right), which test the true residual themselves. */
export function longRecurrence(context: OptionsContext, method: Exclude<KrylovMethod, "minres">): Section {
  const restart = Math.round(positiveParameter(context, "restart", advisedRestart));
  const side: OptionLine[] =
    method === "gmres" ? [{ name: "ksp_pc_side", value: "right", why: "Preconditioned from the right, GMRES sees the true residual." }] : [];
  return {
    title: "Krylov method",
    options: [
      { name: "ksp_type", value: method, why: method === "fgmres" ? "Flexible GMRES: the preconditioner may vary." : "GMRES." },
      ...side,
      { name: "ksp_gmres_restart", value: restart, why: "Vectors kept before a restart; each costs one vector of memory, two for the flexible method." },
      {
        name: "ksp_gmres_cgs_refinement_type",
        value: "refine_ifneeded",
        why: "Orthogonalise again where digits were lost: at contrast the monitored residual else parts from the true one.",
      },
      { name: "ksp_norm_type", value: "unpreconditioned", why: "Stop on the residual of the system itself, not of the preconditioned one." },
      { name: "ksp_rtol", value: shortNumber(context.answers.tolerance), why: "The tolerance asked for." },
      { name: "ksp_max_it", value: iterationLimit(context, 1), why: "Twice the high end of the estimate: past it something is wrong." },
      { name: "ksp_converged_reason", why: "Print why and after how many iterations it stopped." },
    ],
  };
}

/** Iteration limit: twice the estimate's high end, `stretch` for a tighter tolerance; at least 30. */
export function iterationLimit(context: OptionsContext, stretch: number): number {
  return Math.max(30, Math.ceil(2 * stretch * Math.max(1, context.iterationsHigh)));
}

function plainMinres(context: OptionsContext): KrylovPart {
  const { tolerance } = context.answers;
  const expected = tolerance / residualLag(context);
  const given = positiveParameter(context, "monitoredTolerance", expected);
  const monitored = Math.max(1e-14, given < tolerance ? given : expected);
  const stretch = Math.log(monitored) / Math.log(tolerance);
  const options: OptionLine[] = [
    { name: "ksp_type", value: "minres", why: "Symmetric indefinite system, positive definite preconditioner: MINRES, three vectors, no restart." },
    {
      name: "ksp_rtol",
      value: shortNumber(monitored),
      why: `MINRES tests the preconditioned residual only, and the true one lags behind it: the tolerance ${shortNumber(tolerance)} is tightened by a factor ${shortNumber(tolerance / monitored)}, what this mesh and degree need.`,
    },
    { name: "ksp_max_it", value: iterationLimit(context, stretch), why: "Twice the high end of the estimate, stretched to the tighter tolerance." },
    { name: "ksp_monitor_true_residual", why: "Shows both residuals; trust the column ||r(i)||/||b||. Costs one product an iteration: drop it once you trust the run." },
    { name: "ksp_converged_reason", why: "Print why and after how many iterations it stopped." },
  ];
  return { section: { title: "Krylov method", options }, prefix: "" };
}

/** MINRES inside a few outer cycles. */
function guardedMinres(context: OptionsContext): KrylovPart {
  return guarded(context, "MINRES", [
    { name: "ksp_ksp_type", value: "minres", why: "Inner solver: symmetric system, positive definite preconditioner." },
  ]);
}

/** Flexible GMRES inside a few outer cycles, for preconditioners so far from normal that its own residual estimate drifts at contrast. */
export function guardedFlexible(context: OptionsContext): KrylovPart {
  const restart = Math.round(positiveParameter(context, "restart", advisedRestart));
  return guarded(context, "the inner method", [
    { name: "ksp_ksp_type", value: "fgmres", why: "Inner solver: the preconditioner is not symmetric." },
    { name: "ksp_ksp_gmres_restart", value: restart, why: "Vectors kept before a restart, two each." },
  ]);
}

/** Outer test on the true residual around `inner`, whose tolerance is a decade below the asked one but never below what double precision reaches. */
function guarded(context: OptionsContext, name: string, inner: readonly OptionLine[]): KrylovPart {
  const { tolerance } = context.answers;
  const innerTolerance = Math.min(1e-3, Math.max(1e-9, tolerance / 10));
  const stretch = Math.log(innerTolerance) / Math.log(tolerance);
  const options: OptionLine[] = [
    {
      name: "ksp_type",
      value: "fgmres",
      why: `Contrast, boundary, units or size let ${name} report convergence while the true residual is still large. So it runs inside a few outer cycles that test the true residual and repeat it on what is left.`,
    },
    { name: "ksp_norm_type", value: "unpreconditioned", why: "The outer test: residual of the system itself." },
    { name: "ksp_rtol", value: shortNumber(tolerance), why: "The tolerance asked for, in the true relative residual." },
    { name: "ksp_max_it", value: 12, why: "Outer cycles; one to three are normal. More means that the inner solve stalls." },
    { name: "ksp_gmres_restart", value: 12, why: "As many vectors as cycles." },
    { name: "ksp_converged_reason", why: "Outer cycles taken." },
    { name: "pc_type", value: "ksp", why: "The preconditioner of the outer cycle is a whole inner solve." },
    { name: "pc_use_amat", why: "The inner solve is with the system's matrix, also where a preconditioning matrix of its own is given." },
    ...inner,
    { name: "ksp_ksp_rtol", value: shortNumber(innerTolerance), why: "Residual of one cycle, in the norm that the inner method monitors." },
    { name: "ksp_ksp_max_it", value: iterationLimit(context, stretch), why: "Twice the high end of the estimate, for one cycle." },
    { name: "ksp_ksp_converged_reason", why: "Inner iterations: their sum is the number to report." },
  ];
  return { section: { title: "Krylov method, guarded by the true residual", options }, prefix: "ksp_" };
}
