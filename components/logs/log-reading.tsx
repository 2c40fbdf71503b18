import { ResidualHistory } from "@/components/charts/residual-history";
import { Notice } from "@/components/ui/notice";
import type { LogRead } from "@/lib/api/contract/logs";
import type { LogProblem } from "@/lib/logs/parsed-log";
import { FindingList } from "./finding-list";
import { UnderstoodTable } from "./understood-table";
import { relativeHistory } from "./understood-values";

type LogReadingProps = { title: string; read: Pick<LogRead, "parsed" | "findings">; lineTexts?: Readonly<Record<number, string>>; /** Findings stand elsewhere already. */ withoutFindings?: boolean };

/** What a log says: values with their lines, doubts, residual history, findings. */
export function LogReading({ title, read: { parsed, findings }, lineTexts = {}, withoutFindings = false }: LogReadingProps) {
  const history = relativeHistory(parsed);
  const tolerance = parsed.tolerances?.relative ?? null;
  return (
    <div className="grid gap-4">
      <UnderstoodTable parsed={parsed} lineTexts={lineTexts} />
      {parsed.problems.length > 0 && <LogDoubts problems={parsed.problems} />}
      {history.length > 0 && <ResidualHistory title={`Residuals of ${title}`} history={history} {...(tolerance === null || tolerance <= 0 ? {} : { tolerance })} />}
      {!withoutFindings && findings.length > 0 && <FindingList findings={findings} />}
    </div>
  );
}

function LogDoubts({ problems }: { problems: readonly LogProblem[] }) {
  const grave = problems.some(({ severity }) => severity !== "note");
  return (
    <Notice tone={grave ? "warn" : "info"} title="Doubts about this log">
      <ul className="grid gap-1">
        {problems.map(({ line, text }, index) => (
          <li key={index}>{line === null ? text : `Line ${line}: ${text}`}</li>
        ))}
      </ul>
    </Notice>
  );
}
