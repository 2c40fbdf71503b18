import { makeLogScale } from "@/components/charts/log-scale";
import { RatioTrack, TrackAxis } from "@/components/charts/ratio-track";
import { Badge } from "@/components/ui/badge";
import { Quantity, QuantityRange } from "@/components/ui/quantity";
import { formatRatio, type QuantityUnit } from "@/lib/shared/format";
import type { ComparedQuantity, RunComparison } from "@/lib/runs/comparison";
import { residualTexts } from "@/lib/runs/residual-status";

const quantities: Record<ComparedQuantity, { name: string; unit: QuantityUnit }> = {
  totalSeconds: { name: "Total time", unit: "seconds" },
  setupSeconds: { name: "Set-up", unit: "seconds" },
  solveSeconds: { name: "One solve", unit: "seconds" },
  iterations: { name: "Iterations", unit: "count" },
  memoryGiB: { name: "Memory", unit: "gibibytes" },
};

const order: readonly ComparedQuantity[] = ["totalSeconds", "setupSeconds", "solveSeconds", "iterations", "memoryGiB"];

/** Predicted against measured, each as a ratio to the predicted median on one log axis. */
export function RunComparisonTable({ comparison, colour }: { comparison: RunComparison; colour: string }) {
  const rows = order.flatMap((quantity) => comparison.quantities.filter((row) => row.quantity === quantity && row.measured !== null));
  const scale = makeLogScale(
    rows.flatMap(({ predicted, ratio }) => (predicted !== null && predicted.median > 0 ? [predicted.low / predicted.median, predicted.high / predicted.median, ...(ratio === null ? [] : [ratio])] : [])),
  );
  return (
    <div className="grid grid-cols-1 gap-3">
      <p className="flex flex-wrap items-center gap-2 text-sm">
        <Badge tone={comparison.worked ? "forest" : "bad"}>{comparison.worked ? "worked" : "did not work"}</Badge>
        <span className="text-faint">{residualTexts[comparison.residual]}</span>
      </p>
      {rows.length > 0 && (
        <table className="w-full text-sm">
          <caption className="sr-only">Predicted against measured</caption>
          <thead>
            <tr className="border-b border-contour text-left text-xs text-faint">
              <th scope="col" className="py-1 pr-3 font-medium">Quantity</th>
              <th scope="col" className="py-1 pr-3 text-right font-medium">Measured</th>
              <th scope="col" className="py-1 pr-3 text-right font-medium">Predicted</th>
              <th scope="col" className="py-1 pr-3 text-right font-medium">Ratio</th>
              <th scope="col" className="hidden w-2/5 py-1 font-medium sm:table-cell">
                <span className="sr-only">On the axis of ratios to the predicted median</span>
                <TrackAxis scale={scale} format={(value) => formatRatio(value).replace(".0x", "x")} />
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ quantity, predicted, measured, ratio, inside }) => (
              <tr key={quantity} className="border-b border-hairline">
                <th scope="row" className="py-1.5 pr-3 font-normal">{quantities[quantity].name}</th>
                <td className="py-1.5 pr-3 text-right font-semibold"><Quantity value={measured} unit={quantities[quantity].unit} /></td>
                <td className="py-1.5 pr-3 text-right">
                  <Quantity value={predicted?.median ?? null} unit={quantities[quantity].unit} />
                  <span className="block text-xs text-faint">{predicted !== null && <QuantityRange low={predicted.low} high={predicted.high} unit={quantities[quantity].unit} />}</span>
                </td>
                <td className="figures py-1.5 pr-3 text-right">
                  {formatRatio(ratio)}
                  <span className={`block text-xs ${inside === false ? "text-warn" : "text-faint"}`}>{inside === null ? "" : inside ? "in range" : "outside"}</span>
                </td>
                <td className="hidden py-1.5 sm:table-cell">
                  {predicted !== null && predicted.median > 0 && (
                    <RatioTrack
                      scale={scale}
                      low={predicted.low / predicted.median}
                      median={1}
                      high={predicted.high / predicted.median}
                      measured={ratio}
                      colour={colour}
                      words={ratio === null ? "not compared" : `measured ${formatRatio(ratio)} of the predicted`}
                      reference={1}
                    />
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {comparison.notes.length > 0 && (
        <ul className="grid gap-1 text-sm text-faint">
          {comparison.notes.map((note, index) => (
            <li key={index}>{note}</li>
          ))}
        </ul>
      )}
    </div>
  );
}
