import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { z } from "zod";

/** A system to solve: a measured one by file name, or a model one. */
export type SystemSpec =
  | { kind: "files"; name: string; rhs: "wells" | "random" }
  | { kind: "hexahedra"; n: number; degree: number; contrast: number; pattern: "blocks" | "layers"; boundary: string; rhs: "wells" | "random"; hybridised?: boolean }
  | { kind: "tetrahedra"; n: number; contrast: number; pattern: "blocks" | "layers"; boundary: string; rhs: "wells" | "random" };

const resultSchema = z.object({
  reason: z.number(),
  iterations: z.number(),
  trueRelativeResidual: z.number(),
  seconds: z.number(),
  cpuSeconds: z.number(),
  krylov: z.string(),
  preconditioner: z.string(),
  splitSizes: z.array(z.number()),
});
export type PetscResult = z.infer<typeof resultSchema> & {
  /** PETSc's lines about options that it never asked for. */
  unusedOptions: string[];
  output: string;
};

export type PetscJob = { system: SystemSpec; options: string; callingLines: string; repeat?: number };

const python = "/usr/bin/python3";
const petscFolder = "/usr/lib/petscdir";
const driver = join(process.cwd(), "tests/support/petsc/solve.py");
const parallelDriver = join(process.cwd(), "tests/support/petsc/solve-parallel.py");
const outputSchema = z.array(z.object({ status: z.number(), output: z.string() }));

/** One job; see `runPetscAll`. */
export function runPetsc(job: PetscJob): PetscResult {
  const [result] = runPetscAll([job]);
  if (result === undefined) throw new Error("The solve gave no result.");
  return result;
}

/** Run solves, each in a PETSc of its own. Throws with what to install when PETSc's Python interface is missing. */
export function runPetscAll(jobs: readonly PetscJob[]): PetscResult[] {
  const folder = mkdtempSync(join(tmpdir(), "saddlemark-petsc-"));
  try {
    const listed = jobs.map(({ system, options, callingLines, repeat = 1 }, index) => {
      const optionsPath = join(folder, `${index}.petsc`);
      const callingPath = join(folder, `${index}.py`);
      writeFileSync(optionsPath, options);
      writeFileSync(callingPath, callingLines);
      return { system, optionsPath, callingPath, repeat };
    });
    const jobPath = join(folder, "jobs.json");
    writeFileSync(jobPath, JSON.stringify(listed));
    return outputSchema.parse(JSON.parse(spawnPetsc(python, [driver, jobPath]))).map(parse);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** One process needs no MPI daemon and no network. */
export const singleProcess = { OMPI_MCA_ess_singleton_isolated: "1", OMPI_MCA_pml: "ob1", OMPI_MCA_btl: "self" };

/** Standard output of a program that uses PETSc. */
export function spawnPetsc(command: string, args: readonly string[], extra: Record<string, string> = singleProcess): string {
  const child = spawnSync(command, args, { encoding: "utf8", env: { ...petscEnvironment(), ...extra }, timeout: 580_000, maxBuffer: 64 * 2 ** 20 });
  if (child.error) throw new Error(`${command} could not be run to its end: ${child.error.message}. These tests need Debian's python3-petsc4py.`, { cause: child.error });
  if (child.stderr.includes("No module named")) {
    throw new Error("These tests run the real PETSc: install Debian's python3-petsc4py (apt-get install python3-petsc4py).");
  }
  if (child.status !== 0) throw new Error(`${command} failed (exit ${child.status}):\n${child.stdout}\n${child.stderr}`);
  return child.stdout;
}

/** One job on a system of cubes, unassembled, one subdomain a process. */
export function runPetscParallel(job: PetscJob, processes: number): PetscResult {
  const folder = mkdtempSync(join(tmpdir(), "saddlemark-petsc-"));
  try {
    const [optionsPath, callingPath, jobPath] = [join(folder, "case.petsc"), join(folder, "calling.py"), join(folder, "job.json")];
    writeFileSync(optionsPath, job.options);
    writeFileSync(callingPath, job.callingLines);
    writeFileSync(jobPath, JSON.stringify({ system: job.system, optionsPath, callingPath }));
    const args = ["-n", String(processes), "--oversubscribe", python, parallelDriver, jobPath];
    return parse({ status: 0, output: spawnPetsc("mpiexec", args, {}) });
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Debian's module finds PETSc by an alternative that its runtime package alone does not set: name the real-number build. */
export function petscEnvironment(): NodeJS.ProcessEnv {
  return {
    ...process.env,
    PETSC_DIR: petscDirectory(),
    OMP_NUM_THREADS: "1",
    OPENBLAS_NUM_THREADS: "1",
    PYTHONDONTWRITEBYTECODE: "1",
    OMPI_ALLOW_RUN_AS_ROOT: "1",
    OMPI_ALLOW_RUN_AS_ROOT_CONFIRM: "1",
    OMPI_MCA_btl_vader_single_copy_mechanism: "none",
  };
}

function petscDirectory(): string | undefined {
  if (!existsSync(petscFolder)) return undefined;
  for (const version of readdirSync(petscFolder).sort().reverse()) {
    const real = readdirSync(join(petscFolder, version)).find((name) => name.endsWith("-real"));
    if (real !== undefined) return join(petscFolder, version, real);
  }
  return undefined;
}

function parse({ status, output }: { status: number; output: string }): PetscResult {
  const line = output.split("\n").find((text) => text.startsWith("RESULT "));
  if (status !== 0 || line === undefined) throw new Error(`The solve failed (exit ${status}):\n${output}`);
  if (!output.includes("There are no unused options") && !output.includes("unused database option")) {
    throw new Error(`PETSc did not report on unused options:\n${output}`);
  }
  return { ...resultSchema.parse(JSON.parse(line.slice("RESULT ".length))), unusedOptions: unusedIn(output), output };
}

function unusedIn(output: string): string[] {
  return output.split("\n").flatMap((line) => {
    const match = /^Option left: name:(-\S+)/.exec(line);
    const name = match?.[1];
    return name === undefined ? [] : [name];
  });
}
