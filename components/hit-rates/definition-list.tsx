import type { HitRatesResponse } from "@/lib/api/contract/record";
import { hitRateTerms } from "@/lib/hit-rates/definitions";

/** What the figures mean, word for word as the API gives it. */
export function DefinitionList({ definitions }: { definitions: HitRatesResponse["definitions"] }) {
  return (
    <dl className="grid gap-2">
      {hitRateTerms.map((term) => (
        <div key={term}>
          <dt className="font-medium">{definitions[term].term}</dt>
          <dd className="text-faint">{definitions[term].text}</dd>
        </div>
      ))}
    </dl>
  );
}
