import { runnable, type BenchPack } from "./bench-pack";
import { slurmRequest, slurmTime } from "./slurm-request";

/**
 * The driver of a bench pack: plain POSIX sh. Runs each candidate with the user's program, one after the other or one a task of a Slurm array,
 * keeps the logs, and sends them back when there is a key. A finished candidate is marked and not run again, so that a second start resumes.
 */
export function driverScript(pack: BenchPack): string {
  return [header(pack), settings(pack), usage(pack), functionsText, runText, mainText].join("\n");
}

function header(pack: BenchPack): string {
  const { caseNumber, hardware } = pack;
  const { memoryMiB, serialSeconds } = slurmRequest(pack);
  return `#!/bin/sh
#SBATCH --job-name=saddlemark-${caseNumber}
#SBATCH --nodes=${hardware.nodes}
#SBATCH --ntasks=${hardware.cores}
#SBATCH --mem=${memoryMiB}M
#SBATCH --time=${slurmTime(serialSeconds)}
#SBATCH --output=saddlemark-${caseNumber}-%j.out
#
# Bench pack of case ${caseNumber}: runs your program with each candidate's options, keeps the logs, sends them back.
# sh run.sh --help says how. Nothing in here needs root. The estimate behind memory and time is no guarantee.
set -u
`;
}

function settings(pack: BenchPack): string {
  const { caseNumber, hardware, baseUrl } = pack;
  const limit = hardware.timeLimitSeconds === null ? 0 : Math.ceil(hardware.timeLimitSeconds);
  return `case_number=${caseNumber}
candidates='${runnable(pack).map(({ strategy }) => strategy).join(" ")}'
processes=\${SADDLEMARK_PROCESSES:-${hardware.cores}}
address=\${SADDLEMARK_URL:-${baseUrl}}/api/v1/cases/$case_number/logs
# Seconds a candidate may take, 0 for no limit.
limit=\${SADDLEMARK_LIMIT:-${limit}}
# What makes PETSc print all that is read back: residuals, solver, times, memory, options that nothing used.
reports=\${SADDLEMARK_REPORTS:--ksp_converged_reason -ksp_monitor_true_residual -ksp_view -log_view -memory_view -options_left}
`;
}

function usage({ caseNumber }: BenchPack): string {
  return `usage() {
  cat <<'END'
Runs every candidate of this pack with your own program and keeps its log.

  SADDLEMARK_PROGRAM='/path/to/my-solver -mesh /path/to/box.msh' sh run.sh
                                                               one after the other, here or in an allocation
  sbatch --export=ALL run.sh                                   the same as a job
  sbatch --export=ALL --array=1-N run.sh                       one candidate a task; N as --list counts them

Options:
  --dry-run        says what would be run and sent, and does nothing
  --list           numbers and names of the candidates
  --only NAME      one candidate
  --again          runs candidates that are finished already, too
  --send-only      sends the logs that are not sent yet, and runs nothing
  --help           this text

Variables:
  SADDLEMARK_PROGRAM    your program with its arguments, as seen from this folder; it must read PETSc options
                        (-options_file and SADDLEMARK_REPORTS are added)
  SADDLEMARK_PROCESSES  number of processes
  SADDLEMARK_LAUNCHER   what starts it, such as 'mpiexec -n 32'; empty for none; default srun in a Slurm job, else mpiexec
  SADDLEMARK_KEY        a key that may write (team page); without one the logs stay here
  SADDLEMARK_URL        address of the installation
  SADDLEMARK_LIMIT      seconds a candidate may take, 0 for no limit
  SADDLEMARK_REPORTS    PETSc options that print what is read back
  SADDLEMARK_PACK       folder of the pack, when the script is started from elsewhere

A second start goes on with the candidates that are not finished. Logs are in logs/, case ${caseNumber}.
END
}
`;
}

const functionsText = `say() {
  printf 'saddlemark: %s\\n' "$1"
}

fail() {
  printf 'saddlemark: %s\\n' "$1" >&2
  exit 2
}

# Slurm runs a copy of this script from elsewhere: the pack is where the job was submitted.
find_pack() {
  folder=$(dirname "$0")
  [ -d "$folder/options" ] || folder=\${SLURM_SUBMIT_DIR:-.}
  cd "\${SADDLEMARK_PACK:-$folder}" || fail "the folder of the pack can't be entered"
  [ -d options ] || fail "there is no folder options here: start the script in its pack, or set SADDLEMARK_PACK"
}

default_launcher() {
  if [ -n "\${SLURM_JOB_ID:-}" ] && command -v srun >/dev/null 2>&1; then
    printf 'srun -n %s' "$processes"
  elif command -v mpiexec >/dev/null 2>&1; then
    printf 'mpiexec -n %s' "$processes"
  elif [ "$processes" -gt 1 ]; then
    fail "neither srun nor mpiexec is here: set SADDLEMARK_LAUNCHER"
  fi
}

# What the end of the program says where its log says nothing.
outcome_of() {
  case $1 in
    0) ;;
    124) printf '&outcomeIfSilent=over-time' ;;
    137) printf '&outcomeIfSilent=out-of-memory' ;;
    *) printf '&outcomeIfSilent=broken' ;;
  esac
}

# Sends one log. The key goes in by standard input, so that no other user of the machine sees it among the processes; the
# Idempotency-Key is made of the log itself, so that a log is recorded once however often it is sent.
send() {
  log=logs/$1.log
  [ -f "logs/$1.finished" ] || return 0
  [ ! -f "logs/$1.sent" ] || return 0
  if [ -z "\${SADDLEMARK_KEY:-}" ]; then
    say "$1: the log stays in $log; set SADDLEMARK_KEY and start again with --send-only to send it"
    return 0
  fi
  status=$(cat "logs/$1.finished")
  query="source=bench-pack&strategy=$1&fileName=$1.log&coresIfSilent=$processes$(outcome_of "$status")"
  if [ "$dry_run" = yes ]; then
    say "$1: would send $log to $address?$query"
    return 0
  fi
  gzip -c "$log" >"logs/$1.log.gz" || return 1
  if printf 'header = "Authorization: Bearer %s"\\n' "$SADDLEMARK_KEY" |
    curl --config - --silent --show-error --fail --retry 5 --request POST --data-binary "@logs/$1.log.gz" \\
      --header 'Content-Type: text/plain' --header 'Content-Encoding: gzip' --header 'Expect:' \\
      --header "Idempotency-Key: bench-$case_number-$1-$(cksum <"$log" | tr -s ' ' '-')" \\
      --output "logs/$1.answer" "$address?$query"; then
    mv "logs/$1.answer" "logs/$1.sent"
    rm -f "logs/$1.log.gz"
    if grep -q '"runId":null' "logs/$1.sent"; then
      say "$1: sent, but the log does not show how the solve ended; report this run by hand"
    else
      say "$1: sent and recorded"
    fi
  else
    rm -f "logs/$1.log.gz"
    say "$1: not sent; start again with --send-only"
    return 1
  fi
}
`;

const runText = `run() {
  if [ -f "logs/$1.finished" ] && [ "$again" = no ]; then
    say "$1: finished before; not run again"
    return 0
  fi
  name=$1
  # Program and launcher are command lines of the user's own, quotes among them.
  eval "set -- $launcher $SADDLEMARK_PROGRAM -options_file options/$name.petsc $reports"
  if [ "$limit" -gt 0 ] && command -v timeout >/dev/null 2>&1; then
    set -- timeout -k 60 "$limit" "$@"
  fi
  if [ "$dry_run" = yes ]; then
    printf 'saddlemark: %s: would run' "$name"
    printf ' %s' "$@"
    printf '\\n'
    return 0
  fi
  rm -f "logs/$name.finished" "logs/$name.sent"
  say "$name: running; its log is logs/$name.log"
  begun=$(date +%s)
  "$@" </dev/null >"logs/$name.log" 2>&1
  status=$?
  seconds=$(($(date +%s) - begun))
  case $status in
    # Ended from outside: the allocation is over. Without the mark the next start runs it again.
    130 | 143)
      say "$name: ended from outside; start again to run it anew"
      return 1
      ;;
  esac
  # A program that had to be killed after the limit was not short of memory.
  if [ "$status" -eq 137 ] && [ "$limit" -gt 0 ] && [ "$seconds" -ge "$limit" ]; then status=124; fi
  printf '%s\\n' "$status" >"logs/$name.finished"
  say "$name: ended with status $status after $seconds s"
}
`;

const mainText = `dry_run=no
again=no
run_any=yes
chosen=
while [ $# -gt 0 ]; do
  case $1 in
    --dry-run) dry_run=yes ;;
    --again) again=yes ;;
    --send-only) run_any=no ;;
    --only)
      [ $# -gt 1 ] || fail "--only needs the name of a candidate"
      chosen=$2
      shift
      ;;
    --list)
number=0
      for candidate in $candidates; do
        number=$((number + 1))
        printf '%s %s\\n' "$number" "$candidate"
      done
      exit 0
      ;;
    --help)
      usage
      exit 0
      ;;
    *) fail "there is no option $1; --help shows them" ;;
  esac
  shift
done

find_pack
if [ -n "\${SLURM_ARRAY_TASK_ID:-}" ]; then
  chosen=$(for candidate in $candidates; do printf '%s\\n' "$candidate"; done | sed -n "\${SLURM_ARRAY_TASK_ID}p")
  [ -n "$chosen" ] || fail "there is no candidate number $SLURM_ARRAY_TASK_ID; --list shows them"
fi
if [ -n "$chosen" ]; then
  case " $candidates " in
    *" $chosen "*) candidates=$chosen ;;
    *) fail "there is no candidate $chosen; --list shows them" ;;
  esac
fi
launcher=
if [ "$run_any" = yes ]; then
  [ -n "\${SADDLEMARK_PROGRAM:-}" ] || fail "set SADDLEMARK_PROGRAM to your program and its arguments; --help says more"
  launcher=\${SADDLEMARK_LAUNCHER-$(default_launcher)} || exit 2
fi
[ "$dry_run" = yes ] || mkdir -p logs

# A signal ends the driver after the program it ended too, before that is marked as finished.
trap 'exit 143' TERM
trap 'exit 130' INT

missed=0
for candidate in $candidates; do
  if [ "$run_any" = yes ]; then run "$candidate" || exit 1; fi
  send "$candidate" || missed=1
done
exit "$missed"
`;
