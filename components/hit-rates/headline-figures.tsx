import Link from "next/link";
import { WilsonBar } from "@/components/charts/wilson-bar";
import { StrategyLabel } from "@/components/charts/strategy-label";
import { formatPercent, formatRatio } from "@/lib/shared/format";
import type { Rates } from "@/lib/hit-rates/rates";

type HeadlineFiguresProps = { rates: Rates; /** Address of the cases with a result. */ casesWith: (result: string) => string };

/** Worked and best with their intervals, regret and gap closed; each leads to its cases. */
export function HeadlineFigures({ rates, casesWith }: HeadlineFiguresProps) {
  const { worked, best, regret, gapClosed, leftOut } = rates;
  return (
    <div className="grid grid-cols-1 gap-x-10 gap-y-6 sm:grid-cols-2">
      <WilsonBar label="Worked" rate={worked} action={<CaseLinks links={[["worked", worked.x], ["missed", worked.n - worked.x]]} casesWith={casesWith} />} />
      <WilsonBar label="Best" rate={best} action={<CaseLinks links={[["best", best.x], ["beaten", best.n - best.x]]} casesWith={casesWith} />} />
      <Figure name="Regret" value={formatRatio(regret.value)} note={regret.n === 0 ? "no contested case yet" : `geometric mean over ${regret.n} contested ${regret.n === 1 ? "case" : "cases"}`} href={casesWith("contested")} />
      <Figure
        name="Gap closed"
        value={gapClosed.value === null ? "undefined" : formatPercent(gapClosed.value)}
        note={
          gapClosed.singleStrategy === null ? "no contested case yet" : (
            <>
              against always <StrategyLabel strategy={gapClosed.singleStrategy} />, regret {formatRatio(gapClosed.singleRegret)}, on {gapClosed.n} cases
            </>
          )
        }
        href={casesWith("contested")}
      />
      {leftOut > 0 && (
        <p className="text-sm text-faint sm:col-span-2">
          <Link href={casesWith("left-out")} className="prose-link">{leftOut} contested {leftOut === 1 ? "case" : "cases"}</Link> in which nothing converged {leftOut === 1 ? "is" : "are"} left out of best and regret.
        </p>
      )}
    </div>
  );
}

function CaseLinks({ links, casesWith }: { links: readonly [string, number][]; casesWith: (result: string) => string }) {
  return (
    <span className="flex gap-3 text-sm">
      {links.map(([result, count]) => (
        <Link key={result} href={casesWith(result)} className="prose-link">
          {count} {result}
        </Link>
      ))}
    </span>
  );
}

function Figure({ name, value, note, href }: { name: string; value: string; note: React.ReactNode; href: string }) {
  return (
    <div className="grid gap-0.5">
      <span className="text-sm font-semibold">{name}</span>
      <Link href={href} className="figures text-2xl font-semibold underline-offset-4 hover:underline">{value}</Link>
      <span className="text-sm text-faint">{note}</span>
    </div>
  );
}
