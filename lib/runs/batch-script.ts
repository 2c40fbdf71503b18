import type { Hardware } from "@/lib/questionnaire/answers";
import type { StrategyId } from "@/lib/shared/strategy-ids";

export type BatchScriptInput = {
  caseNumber: number;
  strategy: StrategyId;
  hardware: Hardware;
  /** Directives for memory and time, from `resourceRequests`. */
  requests: readonly string[];
  /** Options for PETSc, null where the strategy is a recipe only. */
  options: { filename: string; text: string } | null;
  /** Address of this installation. */
  baseUrl: string;
};

/**
 * A shell script for a Slurm cluster: asks for the case's hardware, runs the user's program with the options file and sends the log, or,
 * where the program was killed before its solver could say how it ended, the outcome. The key comes from the environment, never from
 * the script.
 */
export function batchScript(input: BatchScriptInput): string {
  return [...header(input), ...settings(input), ...optionsLines(input), ...runLines(input), ...reportLines(input), ""].join("\n");
}

function header({ caseNumber, strategy, hardware, requests }: BatchScriptInput): string[] {
  return [
    "#!/bin/bash",
    `#SBATCH --job-name=saddlemark-${caseNumber}-${strategy}`,
    `#SBATCH --nodes=${hardware.nodes}`,
    `#SBATCH --ntasks=${hardware.cores}`,
    `#SBATCH --ntasks-per-node=${Math.ceil(hardware.cores / hardware.nodes)}`,
    ...requests,
    `#SBATCH --output=saddlemark-${caseNumber}-${strategy}-%j.log`,
    "",
    `# Case ${caseNumber}, strategy ${strategy}. The estimate is no guarantee: a job past its memory is killed, and can take a shared node down.`,
    "set -u",
    "# One process a core, so no threads below it.",
    "export OMP_NUM_THREADS=1 OPENBLAS_NUM_THREADS=1 MKL_NUM_THREADS=1",
    "",
  ];
}

function settings({ caseNumber, strategy, baseUrl }: BatchScriptInput): string[] {
  return [
    "# Your program with its own arguments, and a key that may write (team page). Without a key nothing is reported.",
    'program="${PROGRAM:?set PROGRAM to your solver and its arguments}"',
    `address="\${SADDLEMARK_URL:-${baseUrl}}/api/v1/cases/${caseNumber}"`,
    `log="saddlemark-${caseNumber}-${strategy}-\${SLURM_JOB_ID:-local}.out"`,
    "",
  ];
}

const endMark = "END_OF_OPTIONS";

function optionsLines({ options }: BatchScriptInput): string[] {
  if (options === null) return ["# This strategy can't be expressed in options alone: set it up in your program as the recipe says.", 'options=""', ""];
  const name = options.filename.replace(/[^A-Za-z0-9._-]/g, "-");
  // No line of the file may end the here-document early.
  const lines = options.text.trimEnd().split(/\r?\n/).filter((line) => line !== endMark);
  return [`cat > ${name} <<'${endMark}'`, ...lines, endMark, `options="-options_file ${name}"`, ""];
}

function runLines({ hardware }: BatchScriptInput): string[] {
  return [
    "# Not quoted on purpose: the program's arguments and the options are words of their own.",
    `mpiexec -n ${hardware.cores} $program $options -ksp_converged_reason -ksp_view -log_view -memory_view -options_left 2>&1 | tee "$log"`,
    'status="${PIPESTATUS[0]}"',
    "",
    "outcome=broken",
    'if grep -q "solve converged due to" "$log"; then outcome=converged',
    'elif grep -q "DIVERGED_ITS" "$log"; then outcome=stalled',
    'elif grep -q "solve did not converge due to" "$log"; then outcome=diverged',
    'elif [ "$status" -eq 137 ] || grep -qi "out of memory" "$log"; then outcome=out-of-memory',
    'elif [ "$status" -eq 124 ]; then outcome=over-time',
    "fi",
    'iterations="$(sed -n \'s/.*iterations \\([0-9][0-9]*\\).*/\\1/p\' "$log" | tail -n 1)"',
    "",
  ];
}

function reportLines({ strategy, hardware }: BatchScriptInput): string[] {
  const send = '    curl --silent --show-error --fail --retry 3 -X POST -H "Authorization: Bearer $SADDLEMARK_KEY" -H "Idempotency-Key: batch-${SLURM_JOB_ID:-$(date +%s)}" \\';
  return [
    'if [ -n "${SADDLEMARK_KEY:-}" ]; then',
    '  if grep -q "solve converged due to\\|solve did not converge due to" "$log"; then',
    send,
    `      -H "Content-Type: text/plain" --data-binary @"$log" "$address/logs?strategy=${strategy}" && echo`,
    "  else",
    `    printf '{"strategy":"${strategy}","outcome":"%s","iterations":%s,"cores":${hardware.cores},"followedAdvice":true,"note":"reported by the batch script"}' "$outcome" "\${iterations:-null}" |`,
    send,
    '      -H "Content-Type: application/json" --data-binary @- "$address/runs" && echo',
    "  fi",
    "fi",
    'exit "$status"',
  ];
}
