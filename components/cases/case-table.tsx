"use client";

import { createColumnHelper, tableFeatures, useTable } from "@tanstack/react-table";
import { ArrowDown, ArrowUp, ArrowUpDown } from "lucide-react";
import Link from "next/link";
import { useMemo } from "react";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { Badge } from "@/components/ui/badge";
import { Quantity } from "@/components/ui/quantity";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { CaseStatus, CaseSummary } from "@/lib/api/contract/cases";
import { discretisationNames, meshFamilyLabels } from "@/lib/questionnaire/answer-labels";
import { formatDate } from "@/lib/shared/format-date";

type CaseTableProps = { cases: readonly CaseSummary[]; sort: string; onSort: (sort: string) => void };

export const statusLooks: Record<CaseStatus, { word: string; tone: "faint" | "plain" | "forest" | "bad" }> = {
  "no-run": { word: "no run yet", tone: "faint" },
  run: { word: "other runs", tone: "plain" },
  worked: { word: "worked", tone: "forest" },
  missed: { word: "missed", tone: "bad" },
};

const features = tableFeatures({});
const column = createColumnHelper<typeof features, CaseSummary>();

/** Columns that the server can sort by, and the direction their first click gives. */
const sortable: Record<string, "up" | "down"> = { number: "down", title: "up", unknowns: "down", degree: "up" };
const numeric = new Set(["number", "unknowns", "degree", "cores", "runs"]);

const columns = column.columns([
  column.accessor("number", { header: "No.", cell: ({ row }) => <span className="text-faint">{row.original.number}</span> }),
  column.accessor("title", {
    header: "Case",
    cell: ({ row: { original: one } }) => (
      <span className="grid min-w-44">
        <Link href={`/cases/${one.number}`} className="font-medium underline-offset-3 hover:underline">
          {one.title === "" ? `Case ${one.number}` : one.title}
        </Link>
        <span className="text-xs text-faint">{discretisationNames[one.discretisation]}, {meshFamilyLabels[one.meshFamily].toLowerCase()}</span>
      </span>
    ),
  }),
  column.accessor("degree", { header: "Degree" }),
  column.accessor("unknowns", { header: "Unknowns", cell: ({ getValue }) => <Quantity value={getValue()} unit="count" /> }),
  column.accessor("cores", { header: "Cores", cell: ({ getValue }) => <Quantity value={getValue()} unit="count" /> }),
  column.accessor("firstStrategy", { header: "Advised first", cell: ({ row }) => (row.original.firstStrategy === null ? <span className="text-faint">none fits</span> : <StrategyLabel strategy={row.original.firstStrategy} className="whitespace-nowrap" />) }),
  column.accessor("status", { header: "Status", cell: ({ row }) => <Badge tone={statusLooks[row.original.status].tone}>{statusLooks[row.original.status].word}</Badge> }),
  column.accessor("runs", { header: "Runs" }),
  column.accessor("author", { header: "Author", cell: ({ row }) => <span className="whitespace-nowrap">{row.original.author?.name ?? "left the team"}</span> }),
  column.accessor("createdAt", { header: "Made", cell: ({ getValue }) => <span className="whitespace-nowrap text-faint">{formatDate(getValue())}</span> }),
]);

const none: CaseSummary[] = [];

/** Cases as a table; the server filters and sorts, the table shows and asks. */
export function CaseTable({ cases, sort, onSort }: CaseTableProps) {
  const data = useMemo(() => (cases.length === 0 ? none : [...cases]), [cases]);
  const table = useTable({ features, columns, data, getRowId: (one) => one.id });
  return (
    <Table label="Cases">
      <TableHeader>
        {table.getHeaderGroups().map((group) => (
          <TableRow key={group.id}>
            {group.headers.map((header) => (
              <TableHead key={header.id} numeric={numeric.has(header.column.id)} aria-sort={sortState(header.column.id, sort)}>
                {header.column.id in sortable ? (
                  <button type="button" className="inline-flex items-center gap-1 hover:underline" onClick={() => onSort(nextSort(header.column.id, sort))}>
                    <table.FlexRender header={header} />
                    <SortSign column={header.column.id} sort={sort} />
                  </button>
                ) : (
                  <table.FlexRender header={header} />
                )}
              </TableHead>
            ))}
          </TableRow>
        ))}
      </TableHeader>
      <TableBody>
        {table.getRowModel().rows.map((row) => (
          <TableRow key={row.id}>
            {row.getAllCells().map((cell) => (
              <TableCell key={cell.id} numeric={numeric.has(cell.column.id)}>
                <table.FlexRender cell={cell} />
              </TableCell>
            ))}
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}

function sortState(id: string, sort: string): "ascending" | "descending" | undefined {
  if (sort === id) return "ascending";
  return sort === `-${id}` ? "descending" : undefined;
}

function nextSort(id: string, sort: string): string {
  if (sort === id) return `-${id}`;
  if (sort === `-${id}`) return id;
  return sortable[id] === "down" ? `-${id}` : id;
}

function SortSign({ column: id, sort }: { column: string; sort: string }) {
  const state = sortState(id, sort);
  if (state === "ascending") return <ArrowUp aria-hidden className="size-3.5" />;
  return state === "descending" ? <ArrowDown aria-hidden className="size-3.5" /> : <ArrowUpDown aria-hidden className="size-3.5 text-faint" />;
}
