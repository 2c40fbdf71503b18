import { RateTable, type RateTableCell } from "@/components/charts/rate-table";
import type { HitRateGroup } from "@/lib/hit-rates/hit-rates";
import { meshFamilyLabels } from "@/lib/questionnaire/answer-labels";
import { meshFamilies } from "@/lib/questionnaire/answer-sets";

type FamilyDegreeTableProps = { groups: readonly HitRateGroup[]; casesOf: (group: HitRateGroup, result?: string) => string };

/** Worked by mesh family and degree, shaded by rate. */
export function FamilyDegreeTable({ groups, casesOf }: FamilyDegreeTableProps) {
  const degrees = [...new Set(groups.map((group) => degreeOf(group)))].sort();
  const rows = meshFamilies.flatMap((family) => {
    const own = groups.filter((group) => group.filter.meshFamily === family);
    const cells: Record<string, RateTableCell | null> = {};
    for (const group of own) cells[degreeOf(group)] = { ...group.worked, href: casesOf(group, "judged") };
    return own.length === 0 ? [] : [{ id: family, label: meshFamilyLabels[family], cells }];
  });
  return <RateTable caption="Worked, with the number of judged cases" rowHeading="Mesh family" columns={degrees.map((degree) => ({ id: degree, label: `Degree ${degree}` }))} rows={rows} />;
}

function degreeOf(group: HitRateGroup): string {
  return String(group.filter.degree ?? "");
}
