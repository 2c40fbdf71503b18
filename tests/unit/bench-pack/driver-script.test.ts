import { spawnSync } from "node:child_process";
import { chmodSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { afterAll, beforeEach, describe, expect, it } from "vitest";
import { benchPackFiles } from "@/lib/bench-pack/bench-pack";
import { samplePack } from "./sample-pack";

const root = mkdtempSync(join(tmpdir(), "saddlemark-driver-"));
afterAll(() => rmSync(root, { recursive: true, force: true }));

let folder: string;
let tools: string;

const put = (path: string, text: string) => {
  mkdirSync(dirname(path), { recursive: true });
  writeFileSync(path, text);
  chmodSync(path, 0o755);
};

beforeEach(() => {
  const place = mkdtempSync(join(root, "pack-"));
  folder = join(place, "saddlemark-case-12");
  tools = join(place, "tools");
  for (const file of benchPackFiles(samplePack())) put(join(place, file.path), file.text);
  // Stands for the user's program: says what it was given and ends as asked.
  put(join(tools, "solver"), '#!/bin/sh\nfor word in "$@"; do printf "<%s>" "$word"; done\nprintf "\\n"\nprintf x >>"$RUNS"\nexit "${SOLVER_STATUS:-0}"\n');
  // Stands for the network: keeps what it was asked for, and answers.
  put(
    join(tools, "curl"),
    '#!/bin/sh\ncat >>"$CALLS.config"\nprintf "%s\\n" "$*" >>"$CALLS"\nwhile [ $# -gt 0 ]; do if [ "$1" = --output ]; then printf "%s" "${CURL_ANSWER:-{\\"runId\\":\\"abc\\"\\}}" >"$2"; fi; shift; done\nexit "${CURL_STATUS:-0}"\n',
  );
});

type Result = { status: number | null; out: string; err: string };

function drive(args: readonly string[] = [], env: Record<string, string> = {}, cwd = folder): Result {
  const { status, stdout, stderr } = spawnSync("sh", [join(folder, "run.sh"), ...args], {
    cwd,
    encoding: "utf8",
    env: {
      PATH: `${tools}:${process.env.PATH ?? ""}`,
      RUNS: join(tools, "runs"),
      CALLS: join(tools, "calls"),
      SADDLEMARK_PROGRAM: join(tools, "solver"),
      SADDLEMARK_LAUNCHER: "",
      NODE_ENV: "test",
      ...env,
    },
  });
  return { status, out: stdout, err: stderr };
}

const fileText = (path: string) => readFileSync(join(folder, path), "utf8");
const runs = () => (existsSync(join(tools, "runs")) ? readFileSync(join(tools, "runs"), "utf8").length : 0);
const calls = () => (existsSync(join(tools, "calls")) ? readFileSync(join(tools, "calls"), "utf8").trimEnd().split("\n") : []);
const withKey = { SADDLEMARK_KEY: "sm_secret" };

describe("the driver", () => {
  it("has nothing that shellcheck objects to, as POSIX sh", () => {
    const checked = spawnSync("shellcheck", ["--shell=sh", join(folder, "run.sh")], { encoding: "utf8" });
    if (checked.error) throw new Error("This test needs shellcheck: apt-get install shellcheck.", { cause: checked.error });
    expect(checked.stdout).toBe("");
    expect(checked.status).toBe(0);
  });

  it("runs every candidate with its options and keeps the logs", () => {
    expect(drive()).toMatchObject({ status: 0, err: "" });
    for (const name of ["direct-ldlt", "schur-diag-amg"]) {
      expect(fileText(`logs/${name}.log`)).toContain(`<-options_file><options/${name}.petsc><-ksp_converged_reason>`);
      expect(fileText(`logs/${name}.finished`)).toBe("0\n");
    }
    expect(existsSync(join(folder, "logs/p-multigrid.log"))).toBe(false);
  });

  it("passes arguments with quotes as the user wrote them", () => {
    drive([], { SADDLEMARK_PROGRAM: `${join(tools, "solver")} -title 'two words'` });
    expect(fileText("logs/direct-ldlt.log")).toContain("<-title><two words><-options_file>");
  });

  it("starts the program with the launcher", () => {
    put(join(tools, "mpiexec"), '#!/bin/sh\nprintf "launched %s %s\\n" "$1" "$2"\n');
    const { SADDLEMARK_LAUNCHER: _none, ...rest } = { SADDLEMARK_LAUNCHER: "", SADDLEMARK_PROCESSES: "3" };
    const launched = spawnSync("sh", ["run.sh"], { cwd: folder, encoding: "utf8", env: { PATH: `${tools}:${process.env.PATH ?? ""}`, SADDLEMARK_PROGRAM: "solver", NODE_ENV: "test", ...rest } });
    expect(launched.status).toBe(0);
    expect(fileText("logs/direct-ldlt.log")).toBe("launched -n 3\n");
  });

  it("with --dry-run says what it would do and does nothing", () => {
    const { status, out } = drive(["--dry-run"], withKey);
    expect(status).toBe(0);
    expect(out).toContain("direct-ldlt: would run");
    expect([existsSync(join(folder, "logs")), runs(), calls()]).toEqual([false, 0, []]);
  });

  it("goes on where it ended: a finished candidate is not run again, unless asked", () => {
    drive(["--only", "direct-ldlt"]);
    expect(runs()).toBe(1);
    expect(drive().out).toContain("direct-ldlt: finished before");
    expect(runs()).toBe(2);
    drive(["--again"]);
    expect(runs()).toBe(4);
  });

  it.each([143, 130])("does not take a program ended from outside (status %i) for finished, and stops", (status) => {
    expect(drive([], { SOLVER_STATUS: String(status) }).status).toBe(1);
    expect(existsSync(join(folder, "logs/direct-ldlt.finished"))).toBe(false);
    expect(runs()).toBe(1);
    expect(drive().status).toBe(0);
    expect(fileText("logs/direct-ldlt.finished")).toBe("0\n");
  });

  it("ends a candidate over its time and goes on with the next", () => {
    put(join(tools, "slow"), '#!/bin/sh\ncase "$*" in *direct-ldlt*) exec sleep 60 ;; esac\n');
    drive([], { SADDLEMARK_PROGRAM: join(tools, "slow"), SADDLEMARK_LIMIT: "1" });
    expect([fileText("logs/direct-ldlt.finished"), fileText("logs/schur-diag-amg.finished")]).toEqual(["124\n", "0\n"]);
  });

  it("as a task of a Slurm array runs its own candidate, from the copy that Slurm makes of it", () => {
    const copy = join(tools, "slurm_script");
    put(copy, fileText("run.sh"));
    const { status } = spawnSync("sh", [copy], {
      env: { PATH: `${tools}:${process.env.PATH ?? ""}`, RUNS: join(tools, "runs"), SADDLEMARK_PROGRAM: "solver", SADDLEMARK_LAUNCHER: "", SLURM_SUBMIT_DIR: folder, SLURM_ARRAY_TASK_ID: "2", NODE_ENV: "test" },
      cwd: tools,
    });
    expect(status).toBe(0);
    expect([existsSync(join(folder, "logs/direct-ldlt.log")), existsSync(join(folder, "logs/schur-diag-amg.finished"))]).toEqual([false, true]);
    expect(drive([], { SLURM_ARRAY_TASK_ID: "3" })).toMatchObject({ status: 2 });
  });

  it.each([
    [["--only", "magic"], {}, "no candidate magic"],
    [["--only"], {}, "needs the name"],
    [["--faster"], {}, "no option --faster"],
    [[], { SADDLEMARK_PROGRAM: "" }, "set SADDLEMARK_PROGRAM"],
    [[], { SADDLEMARK_PACK: "/nowhere" }, "can't be entered"],
  ])("with %j says what is wrong", (args, env, said) => {
    const { status, err } = drive(args, env);
    expect(status).toBe(2);
    expect(err).toContain(said);
  });

  it("lists its candidates by number", () => {
    expect(drive(["--list"]).out).toBe("1 direct-ldlt\n2 schur-diag-amg\n");
  });
});

describe("sending", () => {
  it("waits for a key, and --send-only makes up for it without running anything", () => {
    expect(drive().out).toContain("set SADDLEMARK_KEY");
    expect(calls()).toEqual([]);
    expect(drive(["--send-only"], { ...withKey, SADDLEMARK_PROGRAM: "" }).status).toBe(0);
    expect([calls().length, runs()]).toEqual([2, 2]);
  });

  it("keeps the key out of the command line", () => {
    drive([], withKey);
    expect(calls().join("\n")).not.toContain("sm_secret");
    expect(readFileSync(join(tools, "calls.config"), "utf8")).toContain('header = "Authorization: Bearer sm_secret"');
  });

  it("names case, strategy and source, and a key that stays the same when it is repeated", () => {
    expect(drive(["--only", "direct-ldlt"], { ...withKey, CURL_STATUS: "22" }).status).toBe(1);
    expect(drive(["--send-only", "--only", "direct-ldlt"], withKey).status).toBe(0);
    const [first, second, ...more] = calls();
    expect(more).toEqual([]);
    expect(first).toBe(second);
    expect(first).toContain("http://127.0.0.1:9/api/v1/cases/12/logs?source=bench-pack&strategy=direct-ldlt&");
    expect(first).toMatch(/Idempotency-Key: bench-12-direct-ldlt-[\d-]+ /);
    expect(first).toContain("coresIfSilent=32");
  });

  it("sends a log once", () => {
    drive([], withKey);
    drive([], withKey);
    expect(calls()).toHaveLength(2);
  });

  it.each([
    ["0", null],
    ["1", "broken"],
    ["124", "over-time"],
    ["137", "out-of-memory"],
  ])("after status %s says %s where the log is silent", (status, outcome) => {
    drive(["--only", "direct-ldlt"], { ...withKey, SOLVER_STATUS: status });
    expect(/outcomeIfSilent=([a-z-]+)/.exec(calls()[0] ?? "")?.[1] ?? null).toBe(outcome);
  });

  it("says when a log arrived and is no run", () => {
    expect(drive(["--only", "direct-ldlt"], { ...withKey, CURL_ANSWER: '{"parsed":{},"runId":null}' }).out).toContain("report this run by hand");
  });
});
