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
  /** Whether all digits are printed: the short monitor rounds. */
  rounded: boolean;
};

const fullNumber = /^(?:\d\.\d{4,}e[+-]\d{2,3}|[+-]?(?:nan|inf|NaN|Inf|NAN|INF))$/;
const shortNumber = /^(?:\d+\.?\d*(?:e[+-]\d{2,3})?)$/;

/**
 * Reads a monitor line: `-ksp_monitor`, `-ksp_monitor_true_residual`, `-ksp_monitor_short`,
 * `-ksp_monitor_singular_value`, of PETSc 3.1 onwards. Returns null unless the whole line has that form: a line cut or
 * wrapped in the middle of a number is not one.
 */
export function readMonitorLine(text: string): MonitorLine | null {
  const keyword = text.indexOf(" KSP ");
  if (keyword < 1 || keyword > 120) return null;
  let start = 0;
  while (text.charCodeAt(start) === 32) start += 1;
  if (start === keyword || keyword - start > 9) return null;
  let iteration = 0;
  for (let index = start; index < keyword; index += 1) {
    const digit = text.charCodeAt(index) - 48;
    if (digit < 0 || digit > 9) return null;
    iteration = iteration * 10 + digit;
  }
  const level = Math.floor((keyword - Math.max(3, keyword - start)) / 2);
  const words = text.slice(keyword + 5).trim().split(/ +/);
  if (words[0] === "Residual" && words[1] === "norm") return readPlain(words, iteration, level);
  if (words[1] === "resid" && words[2] === "norm") return readTrue(words, iteration, level);
  return null;
}

function readPlain(words: readonly string[], iteration: number, level: number): MonitorLine | null {
  const printed = words[2];
  if (printed === undefined) return null;
  // The short monitor prints `< 1.e-11` for what it will not show; the iteration counts, the residual is unknown.
  if (printed === "<" && words.length === 4) {
    return { iteration, level, norm: null, monitored: Number.NaN, trueNorm: null, trueRelative: null, rounded: true };
  }
  const whole = words.length === 3 || (words[3] === "%" && words[4] === "max") || words[3] === "(";
  if (!whole) return null;
  const full = fullNumber.test(printed);
  if (!full && !shortNumber.test(printed)) return null;
  const monitored = toNumber(printed);
  return { iteration, level, norm: null, monitored, trueNorm: null, trueRelative: null, rounded: !full };
}

function readTrue(words: readonly string[], iteration: number, level: number): MonitorLine | null {
  // preconditioned resid norm X true resid norm Y ||r(i)||/||b|| Z
  const [norm, , , printed, word, , , second, ratio, relative] = words;
  if (words.length !== 10 || word !== "true" || printed === undefined || norm === undefined) return null;
  if (ratio !== "||r(i)||/||b||" && ratio !== "||Ae||/||Ax||") return null;
  if (relative === undefined || second === undefined) return null;
  if (!fullNumber.test(printed) || !fullNumber.test(second) || !fullNumber.test(relative)) return null;
  const trueRelative = ratio === "||r(i)||/||b||" ? toNumber(relative) : null;
  return { iteration, level, norm, monitored: toNumber(printed), trueNorm: toNumber(second), trueRelative, rounded: false };
}

function toNumber(printed: string): number {
  const value = Number(printed);
  return Number.isFinite(value) ? value : Number.NaN;
}
