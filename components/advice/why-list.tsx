import { formatNumber } from "@/lib/shared/format";
import type { WhyStep } from "@/lib/estimates/estimate";

/** The reasoning behind an estimate, step by step: formula, what went in, what came out, where it is from. */
export function WhyList({ steps }: { steps: readonly WhyStep[] }) {
  if (steps.length === 0) return <p className="text-sm text-faint">This advice was given before estimates kept their reasoning.</p>;
  return (
    <ol className="grid gap-3">
      {steps.map((step, index) => (
        <li key={index} className="grid gap-1 border-l-2 border-hairline pl-3 text-sm" data-keep-together>
          <p className="flex flex-wrap items-baseline justify-between gap-x-4">
            <span className="font-semibold">{step.quantity}</span>
            <span className="figures">
              {formatNumber(step.value, 4)} {step.unit}
            </span>
          </p>
          <p className="font-mono break-words">{step.formula}</p>
          {step.inputs.length > 0 && (
            <p className="text-faint">
              {step.inputs.map((input) => `${input.name} = ${typeof input.value === "number" ? formatNumber(input.value, 4) : input.value}${input.unit === "" ? "" : ` ${input.unit}`}`).join("; ")}
            </p>
          )}
          <p className="text-faint">Source: {step.source}</p>
        </li>
      ))}
    </ol>
  );
}
