import { MarginFacts } from "@/components/layout/sheet";
import { formatCount, formatGib, formatNumber, formatSeconds } from "@/lib/shared/format";
import { boundaryLabels, discretisationLabels, meshFamilyLabels, patternLabels, priorityLabels } from "@/lib/questionnaire/answer-labels";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";

type AnswersSummaryProps = { questionnaire: Questionnaire; machineName: string | null; memoryGiB: number };

/** The answers that describe a case, for the margin. */
export function AnswersSummary({ questionnaire: q, machineName, memoryGiB }: AnswersSummaryProps) {
  const optional = [
    { name: "Coefficient scale", value: q.coefficientScale, usual: 1 },
    { name: "Coefficient anisotropy", value: q.anisotropy, usual: 1 },
    { name: "Cell aspect ratio", value: q.aspectRatio, usual: 1 },
    { name: "Domain volume", value: q.domainVolume, usual: 1 },
    { name: "Solves with this matrix", value: q.repeatedSolves, usual: 1 },
  ].filter((answer) => answer.value !== answer.usual);
  const limit = q.hardware.timeLimitSeconds;
  return (
    <MarginFacts
      facts={[
        { name: "Discretisation", value: discretisationLabels[q.discretisation] },
        { name: "Degree", value: q.degree },
        { name: "Mesh", value: meshFamilyLabels[q.meshFamily] },
        { name: "Contrast", value: q.contrast.ratio === 1 ? "1" : `${formatNumber(q.contrast.ratio)}, ${patternLabels[q.contrast.pattern].toLowerCase()}` },
        { name: "Boundary", value: boundaryLabels[q.boundary] },
        { name: "Tolerance", value: formatNumber(q.tolerance) },
        ...optional.map((answer) => ({ name: answer.name, value: formatNumber(answer.value) })),
        { name: "Machine", value: machineName ?? "typed in" },
        { name: "Cores", value: formatCount(q.hardware.cores) },
        { name: "Memory", value: formatGib(memoryGiB) },
        ...(limit === null ? [] : [{ name: "Time limit", value: formatSeconds(limit) }]),
        { name: "Priority", value: priorityLabels[q.priority] },
      ]}
    />
  );
}
