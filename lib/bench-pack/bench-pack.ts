import type { Hardware } from "@/lib/questionnaire/answers";
import type { StrategyId } from "@/lib/shared/strategy-ids";
import type { OptionsFile } from "@/lib/strategies/strategy";
import { driverScript } from "./driver-script";
import { readmeText } from "./readme-text";
import type { TarFile } from "./write-tar";

export type PackCandidate = {
  strategy: StrategyId;
  name: string;
  file: OptionsFile;
  recipe: readonly string[];
  /** High ends of the estimate: wall seconds of set-up and all solves, memory over all processes. */
  totalSecondsHigh: number;
  memoryGiBHigh: number;
};

export type BenchPack = {
  caseNumber: number;
  title: string;
  hardware: Pick<Hardware, "cores" | "nodes" | "memoryPerNodeGiB" | "timeLimitSeconds">;
  /** Address of this installation. */
  baseUrl: string;
  /** In the order in which they run. */
  candidates: PackCandidate[];
};

/** Candidates that options can express: the driver runs these. */
export function runnable(pack: BenchPack): PackCandidate[] {
  return pack.candidates.filter(({ file }) => file.kind === "petsc");
}

export function packFolder({ caseNumber }: Pick<BenchPack, "caseNumber">): string {
  return `saddlemark-case-${caseNumber}`;
}

/** All files of a bench pack, in one folder: driver, README, and for each candidate its options with calling lines, or its recipe. */
export function benchPackFiles(pack: BenchPack): TarFile[] {
  const folder = packFolder(pack);
  const files: TarFile[] = [
    { path: "README.txt", text: readmeText(pack) },
    { path: "run.sh", text: driverScript(pack), executable: true },
    ...pack.candidates.flatMap(candidateFiles),
  ];
  return files.map((file) => ({ ...file, path: `${folder}/${file.path}` }));
}

function candidateFiles({ strategy, name, file, recipe }: PackCandidate): TarFile[] {
  if (file.kind === "petsc") {
    const lines = file.callingLines === null ? [] : [{ path: `calling-lines/${strategy}.py`, text: `${file.callingLines.trimEnd()}\n` }];
    return [{ path: `options/${strategy}.petsc`, text: file.text }, ...lines];
  }
  const steps = recipe.map((step, index) => `${index + 1}. ${step}`);
  return [{ path: `recipes/${strategy}.txt`, text: [name, "", `Recipe only: ${file.reason}`, "", ...steps, ""].join("\n") }];
}
