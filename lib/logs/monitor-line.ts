/** One line of a residual monitor. Residuals are NaN where the solver printed nan or inf. */
export type MonitorLine = {
  iteration: number;
  /** Depth of nesting, 0 for the outermost; two columns of indentation each. */
  level: number;
  /** Kind of norm as printed (`preconditioned`, ...), null for the plain monitor. */
  norm: string | null;
  monitored: number;
  /** Norm of the true residual, null where the monitor prints none. */
  trueNorm: number | null;
  /** The same relative to the right-hand side. */
  trueRelative: number | null;
  /** Whether the short monitor rounded the residual (NaN when it printed `< 1.e-11`). */
  rounded: boolean;
};

const keyword = " KSP ";
const plainWords = "Residual norm ";
const residWords = " resid norm ";
const trueWords = " true resid norm ";
const norms = ["preconditioned", "unpreconditioned", "natural", "none"] as const;
const ratios = [" ||r(i)||/||b|| ", " ||Ae||/||Ax|| "] as const;
const notFinite = /^ *[+-]?(?:nan|inf)$/i;
const shortNumber = /^\d+\.?\d*(?:e[+-]\d{2,3})?$/;

/**
 * Reads a monitor line: `-ksp_monitor`, `-ksp_monitor_true_residual`, `-ksp_monitor_short`,
 * `-ksp_monitor_singular_value`, of PETSc 3.1 onwards. Returns null unless the whole line has that form: a line cut or
 * wrapped in the middle of a number is not one. Written without regular expressions on the common path: most lines of a
 * long log pass here.
 */
export function readMonitorLine(text: string): MonitorLine | null {
  let start = 0;
  while (text.charCodeAt(start) === 32) start += 1;
  let at = start;
  let iteration = 0;
  for (; at - start <= 9; at += 1) {
    const digit = text.charCodeAt(at) - 48;
    if (!(digit >= 0 && digit <= 9)) break;
    iteration = iteration * 10 + digit;
  }
  if (at === start || at - start > 9 || !text.startsWith(keyword, at)) return null;
  const level = Math.floor((at - Math.max(3, at - start)) / 2);
  const body = at + keyword.length;
  if (text.startsWith(plainWords, body)) return readPlain(text, body + plainWords.length, iteration, level);
  for (const norm of norms) {
    if (text.startsWith(norm, body)) return readTrue(text, body + norm.length, { norm, iteration, level });
  }
  return null;
}

function readPlain(text: string, from: number, iteration: number, level: number): MonitorLine | null {
  const end = endOfText(text);
  const space = text.indexOf(" ", from);
  const stop = space < 0 || space > end ? end : space;
  const entry = { iteration, level, norm: null, monitored: Number.NaN, trueNorm: null, trueRelative: null, rounded: true };
  // The short monitor prints `< 1.e-11` for what it will not show; the iteration counts, the residual is unknown.
  if (text.charCodeAt(from) === 60) return /^< 1\.e-\d{2}$/.test(text.slice(from, end)) ? entry : null;
  if (stop < end && !text.startsWith(" % max ", stop) && !text.startsWith(" (", stop)) return null;
  if (isFullNumber(text, from, stop)) return { ...entry, monitored: Number(text.slice(from, stop)), rounded: false };
  const printed = text.slice(from, stop);
  if (shortNumber.test(printed)) return { ...entry, monitored: Number(printed) };
  return notFinite.test(text.slice(from, end)) ? { ...entry, rounded: false } : null;
}

/** `preconditioned resid norm X true resid norm Y ||r(i)||/||b|| Z`, from behind the first word. */
function readTrue(text: string, from: number, head: { norm: string; iteration: number; level: number }): MonitorLine | null {
  if (!text.startsWith(residWords, from)) return null;
  const first = from + residWords.length;
  const second = text.indexOf(trueWords, first);
  if (second < 0) return null;
  const ratio = ratios.find((words) => text.includes(words));
  if (ratio === undefined) return null;
  const third = text.indexOf(ratio, second);
  const monitored = readNumber(text, first, second);
  const trueNorm = readNumber(text, second + trueWords.length, third);
  const relative = readNumber(text, third + ratio.length, endOfText(text));
  if (monitored === null || trueNorm === null || relative === null) return null;
  const trueRelative = ratio === ratios[0] ? relative : null;
  return { iteration: head.iteration, level: head.level, norm: head.norm, monitored, trueNorm, trueRelative, rounded: false };
}

function endOfText(text: string): number {
  let end = text.length;
  while (end > 0 && text.charCodeAt(end - 1) === 32) end -= 1;
  return end;
}

/** NaN for nan and inf, null for what is no complete number. */
function readNumber(text: string, from: number, to: number): number | null {
  if (isFullNumber(text, from, to)) return Number(text.slice(from, to));
  return to > from && notFinite.test(text.slice(from, to)) ? Number.NaN : null;
}

/** Whether the text is a number in the monitors' format, such as 8.391406890925e+00: at least four decimals. */
function isFullNumber(text: string, from: number, to: number): boolean {
  if (to - from < 10 || !isDigit(text, from) || text.charCodeAt(from + 1) !== 46) return false;
  let at = from + 2;
  while (at < to && isDigit(text, at)) at += 1;
  if (at - from < 6 || text.charCodeAt(at) !== 101) return false;
  const sign = text.charCodeAt(at + 1);
  if (sign !== 43 && sign !== 45) return false;
  const exponent = to - at - 2;
  if (exponent !== 2 && exponent !== 3) return false;
  for (at += 2; at < to; at += 1) if (!isDigit(text, at)) return false;
  return true;
}

function isDigit(text: string, at: number): boolean {
  const code = text.charCodeAt(at);
  return code >= 48 && code <= 57;
}
