import { RangeBars, type RangeBarsRow } from "@/components/charts/range-bars";
import { Badge } from "@/components/ui/badge";

const rows: readonly RangeBarsRow[] = [
  { id: "1", label: "Block diagonal, Schur complement factorised", mark: "schur-diag-direct", low: 7.6, median: 10.4, high: 15.1, measured: [11.2], first: true, lead: <Rank>1</Rank> },
  { id: "2", label: "Block diagonal, Schur complement by multigrid", mark: "schur-diag-amg", low: 9.1, median: 14.8, high: 25, lead: <Rank>2</Rank> },
  { id: "3", label: "Hybridised, multigrid", mark: "hybridized-amg", low: 11, median: 22, high: 46, lead: <Rank>3</Rank> },
  { id: "4", label: "Sparse direct LDLᵀ", mark: "direct-ldlt", low: 38, median: 52, high: 71, measured: [49], lead: <Rank>4</Rank> },
  { id: "5", label: "Regularised, multigrid", mark: "regularized-amg", low: 41, median: 88, high: 190, lead: <Rank>5</Rank> },
  { id: "6", label: "BDDC", mark: "bddc", low: null, median: null, high: null, muted: true, lead: <Rank>{"–"}</Rank>, note: "unavailable: the program has no unassembled subdomain matrices" },
];

function Rank({ children }: { children: string }) {
  return <span className="figures block w-4 text-right text-faint">{children}</span>;
}

/** What advice looks like, on figures that nobody measured. */
export function ExampleAdvice() {
  return (
    <section aria-labelledby="example" className="grid gap-3">
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <h2 id="example" className="text-xl font-semibold">
          What advice looks like
        </h2>
        <Badge tone="faint">Invented example</Badge>
      </div>
      <p className="max-w-measure text-faint">31³ cubes at degree 1, 395 932 unknowns, 32 cores. The peg above a bar is a measured run: inside its bar, the prediction held.</p>
      <RangeBars title="Predicted total time by strategy" titleHidden axisLabel="Total time" unit="seconds" rows={rows} />
    </section>
  );
}
