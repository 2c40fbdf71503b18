import type { OptionsContext, OptionsFile } from "@/lib/strategies/strategy";
import type { StrategyId } from "@/lib/shared/strategy-ids";

/** One option: its name without the leading dash, its value (none for a flag), and why it is there. */
export type OptionLine = { name: string; value?: string | number; why: string };
export type Section = { title: string; options: readonly OptionLine[] };

type Parts = {
  id: StrategyId;
  title: string;
  context: OptionsContext;
  notes: readonly string[];
  sections: readonly Section[];
  callingLines: string | null;
};

/** An options file in PETSc's syntax: the same context always gives the same bytes. Comments stand on lines of their own. */
export function writeOptionsFile({ id, title, context, notes, sections, callingLines }: Parts): OptionsFile {
  const head = [
    `Saddlemark: PETSc options for ${id} (${title})`,
    caseLine(context),
    "Load with: -options_file " + `${id}.petsc` + "; add -options_left to see that every option is used.",
    ...(callingLines === null ? [] : ["This file needs the calling lines that come with it."]),
    ...notes,
  ];
  const body = sections.map(({ title: heading, options }) =>
    [`# --- ${heading} ---`, ...options.flatMap((option) => [...wrap(option.why), optionText(option)])].join("\n"),
  );
  const text = [head.flatMap(wrap).join("\n"), ...body].join("\n\n") + "\n";
  return { kind: "petsc", filename: `${id}.petsc`, text, callingLines };
}

/** The same options under the prefix of an inner solver. */
export function withPrefix(prefix: string, options: readonly OptionLine[]): OptionLine[] {
  return options.map((option) => ({ ...option, name: prefix + option.name }));
}

/** A number as PETSc reads it, at most three significant digits. */
export function shortNumber(value: number): string {
  const rounded = Number(value.toPrecision(3));
  const useExponent = rounded !== 0 && (Math.abs(rounded) < 1e-3 || Math.abs(rounded) >= 1e6);
  return useExponent ? rounded.toExponential() : String(rounded);
}

function caseLine({ answers, sizes }: OptionsContext): string {
  return (
    `Case: ${answers.discretisation}, degree ${answers.degree}, ${answers.meshFamily}, about ${Math.round(sizes.unknowns)} unknowns, ` +
    `contrast ${shortNumber(answers.contrast.ratio)}, ${answers.boundary}, relative residual ${shortNumber(answers.tolerance)}.`
  );
}

function optionText({ name, value }: OptionLine): string {
  return value === undefined ? `-${name}` : `-${name} ${value}`;
}

/** Comment lines of at most 110 characters, broken at spaces. */
function wrap(text: string): string[] {
  const lines: string[] = [];
  let line = "#";
  for (const word of text.split(" ")) {
    if (line.length + word.length + 1 > 110) {
      lines.push(line);
      line = "#  ";
    }
    line += ` ${word}`;
  }
  return [...lines, line];
}
