import { z } from "zod";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { drillDownSchema, judgeAll, selectRecords, type DrillDown, type HitRateFilter, type JudgedRecord } from "./filter";
import { rateOf, rateSchema, ratesOf, ratesSchema } from "./rates";
import type { HitRateRecord } from "./record";

export const groupings = ["month", "mesh-degree", "strategy", "edition", "rule"] as const;
export type Grouping = (typeof groupings)[number];

export const hitRateGroupSchema = ratesSchema.extend({
  by: z.enum(groupings),
  key: z.string(),
  label: z.string(),
  /** Query parameters by which /cases shows exactly the cases behind the group. */
  filter: drillDownSchema,
  /** Of a rule: cases in whose advice it fired, of these those whose first strategy was run, and of these those that worked. */
  rule: z.object({ fired: z.int(), followed: z.int(), right: rateSchema }).nullable(),
});
export type HitRateGroup = z.infer<typeof hitRateGroupSchema>;

export const hitRatesSchema = ratesSchema.extend({
  /** Cases that match the filter, judged or not. */
  cases: z.int(),
  filter: drillDownSchema,
  groups: z.array(hitRateGroupSchema),
});
export type HitRates = z.infer<typeof hitRatesSchema>;

export type HitRateOptions = { filter?: HitRateFilter; ruleTitles?: ReadonlyMap<string, string> };

/** Every figure of the hit-rates screen from a team's records, overall and by group; groups come in a fixed order. */
export function hitRates(records: readonly HitRateRecord[], options: HitRateOptions = {}): HitRates {
  const filter = options.filter ?? {};
  const selected = selectRecords(judgeAll(records), filter);
  return {
    ...ratesOf(judgementsOf(selected)),
    cases: selected.length,
    filter: { ...filter },
    groups: groupings.flatMap((by) => groupsOf(by, selected, filter, options.ruleTitles)),
  };
}

/** Where a record belongs in each grouping, with the filter that finds it again. */
type Place = { key: string; label: string; sort: string; filter: DrillDown };

const placesOf: Record<Grouping, (item: JudgedRecord, titles: ReadonlyMap<string, string> | undefined) => Place[]> = {
  month: ({ judgement }) => (judgement === null ? [] : [{ key: judgement.month, label: judgement.month, sort: judgement.month, filter: { month: judgement.month } }]),
  "mesh-degree": ({ record: { meshFamily, degree } }) => [
    { key: `${meshFamily}/${degree}`, label: `${meshFamily}, degree ${degree}`, sort: `${meshFamily}/${degree}`, filter: { meshFamily, degree } },
  ],
  strategy: ({ record }) => strategyPlaces(record),
  edition: ({ record: { advice } }) => [
    { key: String(advice.editionNumber), label: `Edition ${advice.editionNumber}`, sort: padded(advice.editionNumber), filter: { edition: advice.editionNumber } },
  ],
  rule: ({ record }, titles) => record.advice.firedRules.map((rule) => ({ key: rule, label: titles?.get(rule) ?? rule, sort: rule, filter: { rule } })),
};

function strategyPlaces({ advice }: HitRateRecord): Place[] {
  const advised = strategyIds.find((id) => id === advice.firstStrategy);
  return advised === undefined ? [] : [{ key: advised, label: advised, sort: padded(strategyIds.indexOf(advised)), filter: { advised } }];
}

function groupsOf(by: Grouping, selected: readonly JudgedRecord[], filter: HitRateFilter, titles: ReadonlyMap<string, string> | undefined): HitRateGroup[] {
  const groups = new Map<string, { place: Place; members: JudgedRecord[] }>();
  for (const item of selected) {
    for (const place of placesOf[by](item, titles)) {
      const group = groups.get(place.key) ?? { place, members: [] };
      group.members.push(item);
      groups.set(place.key, group);
    }
  }
  return [...groups.values()]
    .sort((a, b) => (a.place.sort < b.place.sort ? -1 : 1))
    .map(({ place, members }) => groupOf(by, place, members, filter));
}

function groupOf(by: Grouping, place: Place, members: readonly JudgedRecord[], filter: HitRateFilter): HitRateGroup {
  const rates = ratesOf(judgementsOf(members));
  const rule = by === "rule" ? { fired: members.length, followed: rates.worked.n, right: rateOf(rates.worked.x, rates.worked.n) } : null;
  return { ...rates, by, key: place.key, label: place.label, filter: { ...filter, ...place.filter }, rule };
}

function judgementsOf(items: readonly JudgedRecord[]) {
  return items.flatMap(({ judgement }) => judgement ?? []);
}

function padded(value: number): string {
  return String(value).padStart(10, "0");
}
