import type { ParsedLog } from "@/lib/logs/parsed-log";
import { understoodValues } from "./understood-values";

type UnderstoodTableProps = { parsed: ParsedLog; /** Text of lines by their number, as far as the log is at hand. */ lineTexts: Readonly<Record<number, string>> };

/** Each value that was read, with the line that says so. */
export function UnderstoodTable({ parsed, lineTexts }: UnderstoodTableProps) {
  const values = understoodValues(parsed);
  const silent = values.filter(({ value }) => value === null).map(({ label }) => label.toLowerCase());
  return (
    <div className="grid gap-2 text-sm">
      <dl className="grid gap-x-4 gap-y-1 sm:grid-cols-[auto_minmax(0,1fr)]">
        {values.map(({ field, label, value, line }) =>
          value === null ? null : (
            <div key={field} className="contents">
              <dt className="text-faint">{label}</dt>
              <dd className="min-w-0">
                <span className="figures font-medium break-words">{value}</span>
                {line !== null && <LineReference line={line} text={lineTexts[line]} />}
              </dd>
            </div>
          ),
        )}
      </dl>
      {silent.length > 0 && <p className="text-faint">The log does not say: {silent.join(", ")}.</p>}
    </div>
  );
}

function LineReference({ line, text }: { line: number; text: string | undefined }) {
  if (text === undefined) return <span className="ml-2 text-xs text-faint">line {line}</span>;
  return (
    <details className="ml-2 inline-block max-w-full align-top">
      <summary className="cursor-pointer text-xs text-water underline underline-offset-3">line {line}</summary>
      <code className="block overflow-x-auto bg-wash px-2 py-1 font-mono text-xs whitespace-pre">{text}</code>
    </details>
  );
}
