import type { Hardware } from "@/lib/questionnaire/answers";
import type { StrategyId } from "@/lib/shared/strategy-ids";

export type BatchScriptInput = {
  caseNumber: number;
  strategy: StrategyId;
  hardware: Hardware;
  /** Upper end of the predicted total time. */
  totalSecondsHigh: number;
  /** Options for PETSc, null where the strategy is a recipe only. */
  options: { filename: string; text: string } | null;
  /** Address of this installation. */
  baseUrl: string;
};

/**
 * A shell script for a Slurm cluster: asks for the case's hardware, runs the user's program with the options file and reports the run.
 * The key comes from the environment, never from the script. Predicted times only shorten the request where the case has no limit.
 */
export function batchScript(input: BatchScriptInput): string {
  return [...header(input), ...settings(input), ...optionsLines(input), ...runLines(input), ...reportLines(input), ""].join("\n");
}

/** Leaves a twentieth of a node to its operating system; common practice, no source. */
const memoryShare = 0.95;
const leastMinutes = 10;
/** The request is this many times the predicted upper end, for start-up and assembly. */
const timeAllowance = 3;

function header({ caseNumber, strategy, hardware, totalSecondsHigh }: BatchScriptInput): string[] {
  const seconds = hardware.timeLimitSeconds ?? timeAllowance * totalSecondsHigh;
  const minutes = Math.min(14 * 1440, Math.max(leastMinutes, Math.ceil(seconds / 60)));
  return [
    "#!/bin/bash",
    `#SBATCH --job-name=saddlemark-${caseNumber}-${strategy}`,
    `#SBATCH --nodes=${hardware.nodes}`,
    `#SBATCH --ntasks=${hardware.cores}`,
    `#SBATCH --mem=${Math.max(1, Math.floor(memoryShare * hardware.memoryPerNodeGiB * 1024))}M`,
    `#SBATCH --time=${clockTime(minutes)}`,
    `#SBATCH --output=saddlemark-${caseNumber}-${strategy}-%j.log`,
    "",
    `# Case ${caseNumber}, strategy ${strategy}. The estimate is no guarantee: check memory and time against your site's rules.`,
    "set -u",
    "",
  ];
}

function clockTime(minutes: number): string {
  const pad = (value: number) => String(value).padStart(2, "0");
  const days = Math.floor(minutes / 1440);
  const rest = minutes % 1440;
  const clock = `${pad(Math.floor(rest / 60))}:${pad(rest % 60)}:00`;
  return days > 0 ? `${days}-${clock}` : clock;
}

function settings({ caseNumber, strategy, baseUrl }: BatchScriptInput): string[] {
  return [
    "# Your program with its own arguments, and a key that may write (team page). Without a key nothing is reported.",
    'program="${PROGRAM:?set PROGRAM to your solver and its arguments}"',
    `address="\${SADDLEMARK_URL:-${baseUrl}}/api/v1/cases/${caseNumber}/runs"`,
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
    `mpiexec -n ${hardware.cores} $program $options -ksp_converged_reason 2>&1 | tee "$log"`,
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
  return [
    'if [ -n "${SADDLEMARK_KEY:-}" ]; then',
    `  printf '{"strategy":"${strategy}","outcome":"%s","iterations":%s,"cores":${hardware.cores},"followedAdvice":true,"note":"reported by the batch script"}' "$outcome" "\${iterations:-null}" |`,
    '    curl --silent --show-error --fail --retry 3 -X POST "$address" -H "Authorization: Bearer $SADDLEMARK_KEY" -H "Content-Type: application/json" \\',
    '      -H "Idempotency-Key: batch-${SLURM_JOB_ID:-$(date +%s)}" --data-binary @- && echo',
    "fi",
    'echo "Add set-up and solve times to the run report: they decide whether the advice was the best."',
    'exit "$status"',
  ];
}
