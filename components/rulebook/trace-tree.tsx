import { CircleCheck, CircleHelp, CircleX, type LucideIcon } from "lucide-react";
import { cn } from "@/components/ui/cn";
import { describeCondition, describeValue } from "@/rules/describe";
import type { Facts, FactValue } from "@/rules/fact";
import { findFact } from "@/rules/facts";
import type { Condition } from "@/rules/rule-schema";
import { traceCondition, type ConditionTrace } from "@/rules/trace";
import { truthWords, type Truth } from "@/rules/truth";

const looks: Record<ReturnType<typeof wordOf>, { icon: LucideIcon; classes: string; word: string }> = {
  true: { icon: CircleCheck, classes: "text-forest", word: "holds" },
  false: { icon: CircleX, classes: "text-bad", word: "fails" },
  unknown: { icon: CircleHelp, classes: "text-warn", word: "unknown" },
};

function wordOf(truth: Truth) {
  return truthWords[truth];
}

/** Which parts of a condition hold on a case, with the values of the facts they ask about. */
export function TraceTree({ condition, facts }: { condition: Condition; facts: Facts }) {
  return (
    <ul className="grid gap-1.5 text-sm">
      <TracePart trace={traceCondition(condition, facts)} />
    </ul>
  );
}

const groupWords = { all: "all of these", any: "any of these", not: "not" } as const;

function TracePart({ trace }: { trace: ConditionTrace }) {
  const { icon: Icon, classes, word } = looks[wordOf(trace.truth)];
  return (
    <li className="grid gap-1.5">
      <span className="flex gap-2">
        <Icon aria-hidden className={cn("mt-0.5 size-4 shrink-0", classes)} />
        <span className="min-w-0">
          <span className={cn("font-semibold", classes)}>{word}:</span>{" "}
          {trace.kind === "comparison" ? (
            <>
              {describeCondition(trace.comparison)}; <span className="text-faint">here {factText(trace.comparison.fact, trace.factValue)}</span>
            </>
          ) : (
            groupWords[trace.kind]
          )}
        </span>
      </span>
      {trace.kind !== "comparison" && (
        <ul className="ml-1.5 grid gap-1.5 border-l border-contour pl-4">
          {trace.members.map((member, index) => (
            <TracePart key={index} trace={member} />
          ))}
        </ul>
      )}
    </li>
  );
}

function factText(fact: string, value: FactValue | null): string {
  if (value === null) return "not known";
  const words = describeValue(value, findFact(fact));
  return words === "" ? "none" : words;
}
