import Link from "next/link";
import type { ReactNode } from "react";
import { Table, TableBody, TableCell, TableHead, TableHeader, TableRow } from "@/components/ui/table";
import type { HitRateGroup } from "@/lib/hit-rates/hit-rates";
import { formatCount, formatRatio } from "@/lib/shared/format";
import { RateText } from "./rate-text";

type GroupTableProps = {
  label: string;
  groups: readonly HitRateGroup[];
  nameOf: (group: HitRateGroup) => ReactNode;
  /** Address of the cases behind a group, with a result where one is meant. */
  casesOf: (group: HitRateGroup, result?: string) => string;
};

/** Worked, best and regret by strategy, edition or rule; every figure opens its cases. */
export function GroupTable({ label, groups, nameOf, casesOf }: GroupTableProps) {
  const ofRules = groups.some((group) => group.rule !== null);
  if (groups.length === 0) return <p className="text-sm text-faint">Nothing to show for this filter yet.</p>;
  return (
    <Table label={label}>
      <TableHeader>
        <TableRow>
          <TableHead>{label}</TableHead>
          {ofRules && <TableHead numeric>Fired</TableHead>}
          {ofRules && <TableHead numeric>Followed</TableHead>}
          <TableHead numeric>{ofRules ? "Right" : "Worked"}</TableHead>
          <TableHead numeric>Best</TableHead>
          <TableHead numeric>Regret</TableHead>
        </TableRow>
      </TableHeader>
      <TableBody>
        {groups.map((group) => (
          <TableRow key={group.key}>
            <TableCell>{nameOf(group)}</TableCell>
            {group.rule !== null && <TableCell numeric><Opens href={casesOf(group)}>{formatCount(group.rule.fired)}</Opens></TableCell>}
            {group.rule !== null && <TableCell numeric><Opens href={casesOf(group, "judged")}>{formatCount(group.rule.followed)}</Opens></TableCell>}
            <TableCell numeric><Opens href={casesOf(group, "worked")}><RateText rate={group.worked} /></Opens></TableCell>
            <TableCell numeric><Opens href={casesOf(group, "best")}><RateText rate={group.best} /></Opens></TableCell>
            <TableCell numeric><Opens href={casesOf(group, "contested")}>{formatRatio(group.regret.value)}</Opens></TableCell>
          </TableRow>
        ))}
      </TableBody>
    </Table>
  );
}

function Opens({ href, children }: { href: string; children: ReactNode }) {
  return <Link href={href} className="underline decoration-hairline underline-offset-4 hover:decoration-ink">{children}</Link>;
}
