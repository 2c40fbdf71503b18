import Link from "next/link";
import { cn } from "@/components/ui/cn";
import { leastCasesForRate } from "@/lib/hit-rates/definitions";
import { formatOf, formatPercent, formatRange } from "@/lib/shared/format";

export type RateTableCell = { x: number; n: number; low: number; high: number; /** Opens the cases behind the figure. */ href: string };

type RateTableProps = {
  caption: string;
  /** What the rows are, such as "Mesh family". */
  rowHeading: string;
  columns: readonly { id: string; label: string }[];
  rows: readonly { id: string; label: string; cells: Readonly<Record<string, RateTableCell | null>> }[];
  className?: string;
};

/** A table shaded by rate. The figures stand in every cell; the shade only leads the eye, and never darker than text on it can bear. */
export function RateTable({ caption, rowHeading, columns, rows, className }: RateTableProps) {
  return (
    <div role="region" aria-label={caption} tabIndex={0} className={cn("relative overflow-x-auto print:overflow-visible", className)}>
      <table className="w-full border-separate border-spacing-0.5 text-sm">
        <caption className="pb-2 text-left text-sm text-faint">{caption}</caption>
        <thead>
          <tr>
            <th scope="col" className="py-1 pr-3 text-left font-semibold">
              {rowHeading}
            </th>
            {columns.map((column) => (
              <th key={column.id} scope="col" className="px-2 py-1 text-right font-semibold whitespace-nowrap">
                {column.label}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id}>
              <th scope="row" className="py-1 pr-3 text-left font-medium whitespace-nowrap">
                {row.label}
              </th>
              {columns.map((column) => (
                <RateCell key={column.id} cell={row.cells[column.id] ?? null} name={`${row.label}, ${column.label}`} />
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function RateCell({ cell, name }: { cell: RateTableCell | null; name: string }) {
  if (cell === null || cell.n === 0) {
    return (
      <td className="border border-dashed border-hairline px-2 py-1.5 text-right text-faint">
        <span aria-hidden>–</span>
        <span className="sr-only">no runs</span>
      </td>
    );
  }
  const share = cell.x / cell.n;
  const interval = formatRange(cell.low, cell.high, "fraction");
  return (
    <td className="figures border border-hairline p-0 text-right" style={{ backgroundColor: `color-mix(in srgb, var(--forest) ${Math.round(share * 42)}%, var(--sheet))` }}>
      <Link href={cell.href} className="block px-2 py-1.5 hover:underline" title={`95 % interval ${interval}`} aria-label={`${name}: ${formatPercent(share)}, ${formatOf(cell.x, cell.n)}, 95 % interval ${interval}`}>
        {cell.n >= leastCasesForRate && <span className="block font-semibold">{formatPercent(share)}</span>}
        <span className="block text-xs whitespace-nowrap">{formatOf(cell.x, cell.n)}</span>
      </Link>
    </td>
  );
}
