"use client";

import { useId, useState } from "react";
import { Button } from "@/components/ui/button";
import { cn } from "@/components/ui/cn";
import { controlClasses } from "@/components/ui/input";
import { editionFile, parseEdition } from "@/rules/edition-json-schema";
import { ruleSchema, type Rule } from "@/rules/rule-schema";
import { ProblemLines, type ParameterCatalogue, type RuleProblem } from "./rule-problems";

type RuleJsonProps = { rule: Rule; catalogue: ParameterCatalogue; readOnly: boolean; /** Called with null while what stands in the box is no rule. */ onChange: (rule: Rule | null) => void };

/**
 * The rule as JSON, editable and checked as it is typed. What fits goes to the form at once, and what the form changes comes back; while the
 * text fits no rule, the form keeps the last one that did.
 */
export function RuleJson({ rule, catalogue, readOnly, onChange }: RuleJsonProps) {
  const id = useId();
  const [shown, setShown] = useState(rule);
  const [text, setText] = useState(() => jsonOf(rule));
  const [problems, setProblems] = useState<RuleProblem[]>([]);
  // Changed in the form, by undo, or another rule chosen.
  if (rule !== shown) {
    setShown(rule);
    setText(jsonOf(rule));
    setProblems([]);
  }
  function type(next: string): void {
    setText(next);
    const read = readRule(next, catalogue);
    setProblems(read.problems);
    if (read.rule !== null) setShown(read.rule);
    onChange(read.rule);
  }
  return (
    <div className="grid min-w-0 gap-2">
      <label htmlFor={id} className="text-sm font-semibold">This rule as JSON</label>
      <textarea
        id={id}
        value={text}
        readOnly={readOnly}
        spellCheck={false}
        aria-invalid={problems.length > 0 || undefined}
        aria-describedby={`${id}-problems`}
        onChange={(event) => type(event.target.value)}
        className={cn(controlClasses, "min-h-96 resize-y py-2 font-mono text-sm leading-5 whitespace-pre")}
        rows={Math.min(40, text.split("\n").length + 1)}
      />
      <div id={`${id}-problems`} className="grid gap-2">
        {problems.length > 0 && (
          <>
            <ProblemLines problems={problems.map((problem) => ({ ...problem, message: problem.path === "" ? problem.message : `${problem.path}: ${problem.message}` }))} />
            <p className="text-sm text-faint">The form waits with the last text that was a rule.</p>
            <div>
              <Button
                size="small"
                onClick={() => {
                  setText(jsonOf(rule));
                  setProblems([]);
                  onChange(rule);
                }}
              >
                Put the form&apos;s rule back
              </Button>
            </div>
          </>
        )}
      </div>
    </div>
  );
}

function jsonOf(rule: Rule): string {
  return JSON.stringify(rule, null, 2);
}

/** A rule out of text, or why it is none; places within the rule. */
export function readRule(text: string, catalogue: ParameterCatalogue): { rule: Rule | null; problems: RuleProblem[] } {
  const found = parseText(text);
  if (!found.ok) return { rule: null, problems: [{ path: "", message: `This is not JSON: ${found.message}.`, severity: "error" }] };
  const parsed = ruleSchema.safeParse(found.value);
  if (parsed.success) return { rule: parsed.data, problems: [] };
  const located = parseEdition({ ...editionFile([], ""), rules: [found.value] }, catalogue);
  return { rule: null, problems: located.problems.map((problem) => ({ ...problem, path: problem.path.replace(/^rules\.0\.?/, "") })) };
}

function parseText(text: string): { ok: true; value: unknown } | { ok: false; message: string } {
  try {
    const value: unknown = JSON.parse(text);
    return { ok: true, value };
  } catch (error) {
    return { ok: false, message: error instanceof Error ? error.message : "unreadable" };
  }
}
