import type { ReactNode } from "react";

/** The figures of a drawing as a table, folded away until it is asked for. */
export function ChartTable({ caption, columns, rows }: { caption: string; columns: readonly string[]; rows: readonly (readonly ReactNode[])[] }) {
  return (
    <details className="mt-3 text-sm" data-screen-only>
      <summary className="w-fit py-1 text-water underline underline-offset-3 hover:text-ink">Show the figures as a table</summary>
      <div role="region" aria-label={caption} tabIndex={0} className="mt-2 max-h-96 overflow-auto">
        <table className="figures w-full border-collapse text-sm">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr className="border-b border-contour">
              {columns.map((column, index) => (
                <th key={column} scope="col" className={index === 0 ? "py-1.5 pr-3 text-left" : "px-3 py-1.5 text-right"}>
                  {column}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row, rowIndex) => (
              <tr key={rowIndex} className="border-b border-hairline">
                {row.map((value, index) => (
                  <td key={index} className={index === 0 ? "py-1.5 pr-3" : "px-3 py-1.5 text-right whitespace-nowrap"}>
                    {value}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
