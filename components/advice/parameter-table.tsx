import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import { formatNumber } from "@/lib/shared/format";

const words: Record<string, { label: string; note: string }> = {
  gamma: { label: "gamma", note: "weight of the divergence term: A + gamma Bᵀ W⁻¹ B" },
  gammaOverH2: { label: "c in gamma = c h² / scale", note: "keep c when the mesh changes, not gamma" },
};

/** Parameters as advised, after the rules. */
export function ParameterTable({ parameters, spacing }: { parameters: Record<string, number | string>; spacing: number }) {
  const rows = Object.entries(parameters);
  if (rows.length === 0) return <p className="text-sm text-faint">Nothing to set beyond the options file.</p>;
  return (
    <Table label="Parameters">
      <TableHeader>
        <TableRow>
          <TableHead>Parameter</TableHead>
          <TableHead numeric>Value</TableHead>
          <TableHead>Meaning</TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        {rows.map(([name, value]) => (
          <TableRow key={name}>
            <TableCell className="font-mono">{words[name]?.label ?? name}</TableCell>
            <TableCell numeric>{typeof value === "number" ? formatNumber(value, 4) : value}</TableCell>
            <TableCell className="text-faint">
              {words[name]?.note ?? ""}
              {name === "gamma" && typeof value === "number" ? `; ${formatNumber(value / spacing ** 2, 3)} h² with h = ${formatNumber(spacing, 3)}` : ""}
            </TableCell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
