const escape = "\u001b";
const colourCodes = /\u001b(?:\[[0-9;?]*[ -/]*[@-~]|\][^\u0007\u001b]*(?:\u0007|\u001b\\)|[@-Z\\^_])/g;
const openMpiTag = /^\[\d+,(\d+)\]<std(?:out|err)>:?/;
const bracketRank = /^\[(\d+)\] ?(?!PETSC)/;
const colonRank = /^ {0,5}(\d{1,7}): ?/;
const dateAndTime = /^\[?\d{4}-\d\d-\d\d[T ]\d\d:\d\d:\d\d(?:[.,]\d{1,9})?(?:Z|[+-]\d\d:?\d\d)?\]? ?(?:\| ?)?/;
const timeOnly = /^\[?\d\d:\d\d:\d\d(?:[.,]\d{1,9})?\]? (?:\| ?)?/;

/** Drops colour codes, the end of a CRLF, and what a terminal would have overwritten (text before an inner CR). */
export function removeTerminalCodes(line: string): string {
  let text = line;
  if (text.includes(escape)) text = text.replace(colourCodes, "");
  if (!text.includes("\r")) return text;
  const end = text.replace(/\r+$/, "");
  return end.slice(end.lastIndexOf("\r") + 1);
}

/** A line without the label a job launcher or a logger puts before it; `rank` is null where no label names one. */
export type UnlabelledLine = { text: string; rank: number | null; /** The line without its time stamp, rank label kept. */ unstamped: string };

/**
 * Strips time stamps (`2026-12-01T04:26:27`, `04:26:27`) and rank labels (`[0] `, `0: `, `[1,0]<stdout>:`). At most one
 * space behind a label goes with it: the indentation of the solver's own text means something.
 */
export function removeLabel(line: string): UnlabelledLine {
  const stamped = dateAndTime.exec(line) ?? timeOnly.exec(line);
  const text = stamped === null ? line : line.slice(stamped[0].length);
  const match = openMpiTag.exec(text) ?? bracketRank.exec(text) ?? (isStageLine(text) ? null : colonRank.exec(text));
  if (match === null) return { text, rank: null, unstamped: text };
  return { text: text.slice(match[0].length), rank: Number(match[1]), unstamped: text };
}

/** ` 0:      Main Stage: 2.4e+00 100.0%` in a performance summary is a stage, not a rank. */
function isStageLine(text: string): boolean {
  return text.includes("%");
}

/** Whether a line may carry a label at all, from its first character. */
export function mayCarryLabel(line: string): boolean {
  const code = line.charCodeAt(0);
  return code === 91 || (code >= 48 && code <= 57) || (code === 32 && /^ {1,5}\d{1,7}:/.test(line));
}

export function indentOf(text: string): number {
  let indent = 0;
  while (text.charCodeAt(indent) === 32) indent += 1;
  return indent;
}
