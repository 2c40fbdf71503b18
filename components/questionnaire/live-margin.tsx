"use client";

import { StrategyLabel } from "@/components/charts/strategy-label";
import { MarginFacts, MarginSection } from "@/components/layout/sheet";
import { Quantity } from "@/components/ui/quantity";
import { Skeleton } from "@/components/ui/skeleton";
import type { Advice } from "@/lib/advice/advice";
import type { Sizes } from "@/lib/sizes/sizes";

type LiveMarginProps = {
  sizes: Sizes | null;
  advice: Advice | undefined;
  /** The answers changed since the advice shown. */
  stale: boolean;
  failure: string | null;
};

/** What the answers imply, while they are being given. */
export function LiveMargin({ sizes, advice, stale, failure }: LiveMarginProps) {
  return (
    <>
      <MarginSection title="Sizes">
        {sizes === null ? <p className="text-faint">The sizes follow once the answers marked in the form can be used.</p> : <SizeFacts sizes={sizes} />}
      </MarginSection>
      <MarginSection title="Provisional first choice">
        <div aria-live="polite" aria-busy={stale}>
          <FirstChoice advice={advice} stale={stale} failure={failure} waiting={sizes !== null} />
        </div>
      </MarginSection>
    </>
  );
}

export function SizeFacts({ sizes }: { sizes: Sizes }) {
  const facts = [
    { name: "Cells", value: <Quantity value={sizes.cells} unit="count" /> },
    { name: "Faces", value: <Quantity value={sizes.faces} unit="count" /> },
    { name: "Spacing h", value: <Quantity value={sizes.spacing} unit="number" /> },
    { name: "Velocity unknowns", value: <Quantity value={sizes.velocityUnknowns} unit="count" /> },
    { name: "Pressure unknowns", value: <Quantity value={sizes.pressureUnknowns} unit="count" /> },
    { name: "Unknowns in all", value: <Quantity value={sizes.unknowns} unit="count" /> },
    { name: "Removed at the boundary", value: <Quantity value={sizes.eliminatedVelocityUnknowns} unit="count" /> },
    { name: "Nonzeros of K", value: <Quantity value={sizes.nonzeros.total} unit="count" /> },
  ];
  return (
    <>
      <MarginFacts facts={facts} />
      <p className="mt-2 text-faint">{sizes.exact ? "Counted exactly." : "Means of random meshes of this family; a mesh of yours differs by a few per cent."}</p>
    </>
  );
}

function FirstChoice({ advice, stale, failure, waiting }: { advice: Advice | undefined; stale: boolean; failure: string | null; waiting: boolean }) {
  if (failure !== null) return <p className="text-bad">{failure}</p>;
  if (!advice) return waiting ? <Skeleton className="h-16" /> : <p className="text-faint">Not yet.</p>;
  const first = advice.ranking.find((entry) => entry.status === "ranked");
  if (!first) return <p>No strategy fits these answers; the advice says for each one why.</p>;
  const second = advice.ranking.find((entry) => entry.rank === 2 && entry.status === "ranked");
  return (
    <div className={stale ? "opacity-60 transition-opacity" : "transition-opacity"}>
      <p className="font-semibold">
        <StrategyLabel strategy={first.strategy} />
      </p>
      <MarginFacts
        facts={[
          { name: "Predicted time", value: <Quantity value={first.estimate.totalSeconds.median} unit="seconds" /> },
          { name: "Memory", value: <Quantity value={first.estimate.memoryGiB.median} unit="gibibytes" /> },
          ...(second ? [{ name: <>Next: <StrategyLabel strategy={second.strategy} /></>, value: <Quantity value={second.relativeTime} unit="ratio" /> }] : []),
        ]}
      />
    </div>
  );
}
