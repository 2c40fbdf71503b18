import type { LogProblem } from "@/lib/logs/parsed-log";

const limit = 200;

/** Problems found so far, at most 200, the same text once. */
export type ProblemList = {
  add(severity: LogProblem["severity"], line: number | null, text: string): void;
  items(): LogProblem[];
};

export function createProblemList(): ProblemList {
  const found: LogProblem[] = [];
  const seen = new Set<string>();
  let dropped = 0;
  return {
    add(severity, line, text) {
      if (seen.has(text)) return;
      if (found.length >= limit) {
        dropped += 1;
        return;
      }
      seen.add(text);
      found.push({ line, text, severity });
    },
    items() {
      if (dropped === 0) return [...found];
      return [...found, { line: null, severity: "note", text: `${dropped} more problems are not listed.` }];
    },
  };
}
