import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { MachineView } from "@/lib/api/contract/machines";
import { formatCount, formatGib, formatNumber } from "@/lib/shared/format";

type MachineTableProps = { machines: readonly MachineView[]; onEdit: ((machine: MachineView) => void) | null; onDelete: ((machine: MachineView) => void) | null };

/** Machine sheets with their rates. A sheet named by cases can't be deleted. */
export function MachineTable({ machines, onEdit, onDelete }: MachineTableProps) {
  return (
    <Table label="Machine sheets">
      <TableHeader>
        <TableRow>
          <TableHead>Machine</TableHead>
          <TableHead numeric>Nodes</TableHead>
          <TableHead numeric>Cores a node</TableHead>
          <TableHead numeric>Memory a node</TableHead>
          <TableHead numeric>Bandwidth a node</TableHead>
          <TableHead numeric>Rate a core</TableHead>
          <TableHead numeric>Latency</TableHead>
          <TableHead numeric>Link</TableHead>
          <TableHead numeric>Cases</TableHead>
          {onEdit !== null && <TableHead><span className="sr-only">Change</span></TableHead>}
        </TableRow>
      </TableHeader>
      <TableBody>
        {machines.map((machine) => (
          <TableRow key={machine.id}>
            <TableCell className="font-medium">
              {machine.name} {machine.demonstration && <Badge tone="faint">invented</Badge>}
            </TableCell>
            <TableCell numeric>{formatCount(machine.nodes)}</TableCell>
            <TableCell numeric>{formatCount(machine.coresPerNode)}</TableCell>
            <TableCell numeric>{formatGib(machine.memoryPerNodeGiB)}</TableCell>
            <TableCell numeric>{formatNumber(machine.bandwidthPerNodeGBps)} GB/s</TableCell>
            <TableCell numeric>{formatNumber(machine.gflopsPerCore)} Gflop/s</TableCell>
            <TableCell numeric>{formatNumber(machine.networkLatencyMicroseconds)} µs</TableCell>
            <TableCell numeric>{formatNumber(machine.networkBandwidthGBps)} GB/s</TableCell>
            <TableCell numeric>{formatCount(machine.cases)}</TableCell>
            {onEdit !== null && (
              <TableCell>
                <span className="flex gap-1">
                  <Button size="small" onClick={() => onEdit(machine)}>Change</Button>
                  {onDelete !== null && <Button size="small" variant="quiet" disabled={machine.cases > 0} title={machine.cases > 0 ? "Cases name this sheet" : undefined} onClick={() => onDelete(machine)}>Delete</Button>}
                </span>
              </TableCell>
            )}
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}
