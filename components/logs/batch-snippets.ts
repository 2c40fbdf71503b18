/**
 * Shell lines that report a run from a job script, for sh and bash. The key goes to curl by standard input, so that no other user of the
 * node sees it among the processes.
 */
export function batchSnippets(origin: string, caseNumber: number): { log: string; json: string } {
  const address = `${origin}/api/v1/cases/${caseNumber}`;
  const call = [
    `printf 'header = "Authorization: Bearer %s"\\n' "$SADDLEMARK_KEY" |`,
    "  curl --config - --silent --show-error --fail --retry 5 --request POST \\",
    `    --header "Idempotency-Key: job-\${SLURM_JOB_ID:-$(date +%s)}-\${SLURM_ARRAY_TASK_ID:-0}" \\`,
  ];
  const log = [
    "# LOG: what your solver printed.",
    'gzip -c "${LOG:?}" >"$LOG.gz"',
    ...call,
    `    --header 'Content-Type: text/plain' --header 'Content-Encoding: gzip' \\`,
    `    --data-binary "@$LOG.gz" "${address}/logs"`,
    'rm -f "$LOG.gz"',
  ];
  const json = [
    "# Times in wall seconds, memory in GiB over all processes; only strategy and outcome must be given.",
    `run='{"strategy":"schur-diag-amg","outcome":"converged","iterations":42,"setupSeconds":1.5,"solveSeconds":12.5,"cores":32}'`,
    ...call,
    `    --header 'Content-Type: application/json' --data "$run" "${address}/runs"`,
  ];
  return { log: `${log.join("\n")}\n`, json: `${json.join("\n")}\n` };
}
