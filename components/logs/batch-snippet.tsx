import { CodeBlock } from "@/components/ui/code-block";
import { batchSnippets } from "./batch-snippets";

type BatchSnippetProps = { /** Address of this installation. */ origin: string; caseNumber: number };

/** Lines for the end of a job script that send the log, or a run as JSON, with a key. */
export function BatchSnippet({ origin, caseNumber }: BatchSnippetProps) {
  const { log, json } = batchSnippets(origin, caseNumber);
  return (
    <div className="grid gap-3 text-sm">
      <p>
        Put one of these at the end of the job script. The key comes from the environment, <code className="font-mono text-xs">SADDLEMARK_KEY</code>, and must be one that may write; an owner makes it on the team
        page. A job that is requeued or a call that is retried records nothing twice, because both carry the job&apos;s id.
      </p>
      <CodeBlock title="Send the log" code={log} fileName={`report-log-case-${caseNumber}.sh`} />
      <CodeBlock title="Send a run" code={json} fileName={`report-run-case-${caseNumber}.sh`} />
      <p className="text-faint">
        The log says the more, the more the solver prints: <code className="font-mono text-xs">-ksp_converged_reason -ksp_monitor_true_residual -ksp_view -log_view -memory_view -options_left</code>. Name the strategy
        with <code className="font-mono text-xs">?strategy=</code> where the solver view does not show it. Several runs go to <code className="font-mono text-xs">/runs/batch</code> as one JSON array.
      </p>
    </div>
  );
}
