"use client";

import { createContext, useContext, type ReactNode } from "react";
import { CircleAlert, Info, TriangleAlert } from "lucide-react";
import { cn } from "@/components/ui/cn";
import { parseEdition, editionFile } from "@/rules/edition-json-schema";
import type { RuleSet } from "@/rules/rule-schema";
import type { ParameterCatalogue, RuleProblem, Severity } from "@/rules/validate-rule-set";

export type { ParameterCatalogue, RuleProblem };

/** Everything that is wrong with rules, by its place; rules counted from 0, such as "3.when.all.0.value". */
export function problemsOf(rules: RuleSet, catalogue: ParameterCatalogue): RuleProblem[] {
  return parseEdition({ ...editionFile([], ""), rules }, catalogue).problems.map((problem) => ({ ...problem, path: problem.path.replace(/^rules\.?/, "") }));
}

const ProblemContext = createContext<readonly RuleProblem[]>([]);

export function ProblemProvider({ problems, children }: { problems: readonly RuleProblem[]; children: ReactNode }) {
  return <ProblemContext value={problems}>{children}</ProblemContext>;
}

/** The first error exactly at a place, for the field there. */
export function useErrorAt(path: string): string | undefined {
  return useContext(ProblemContext).find((problem) => problem.path === path && problem.severity === "error")?.message;
}

const looks: Record<Severity, { icon: typeof Info; classes: string; word: string }> = {
  error: { icon: CircleAlert, classes: "text-bad", word: "Error" },
  warning: { icon: TriangleAlert, classes: "text-warn", word: "Warning" },
  note: { icon: Info, classes: "text-water", word: "Note" },
};

/** Problems exactly at a place that no field shows. `errorsToo` where no field does. */
export function ProblemsAt({ path, errorsToo = false }: { path: string; errorsToo?: boolean }) {
  const problems = useContext(ProblemContext).filter((problem) => problem.path === path && (errorsToo || problem.severity !== "error"));
  return <ProblemLines problems={problems} />;
}

export function ProblemLines({ problems }: { problems: readonly RuleProblem[] }) {
  if (problems.length === 0) return null;
  return (
    <ul className="grid gap-1 text-sm" aria-live="polite">
      {problems.map(({ message, severity, path }, index) => {
        const { icon: Icon, classes, word } = looks[severity];
        return (
          <li key={`${path}-${index}`} className="flex gap-2">
            <Icon aria-hidden className={cn("mt-0.5 size-4 shrink-0", classes)} />
            <span>
              <span className={cn("font-semibold", classes)}>{word}:</span> {message}
            </span>
          </li>
        );
      })}
    </ul>
  );
}
