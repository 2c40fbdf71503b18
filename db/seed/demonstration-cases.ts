import type { Advice } from "@/lib/advice/advice";
import { readRecord, type RecordedRuns } from "@/lib/advice/observations";
import { computeAdvice } from "@/lib/advice/pipeline";
import { toAnswers, type Answers } from "@/lib/questionnaire/answers";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import type { Machine } from "@/lib/questionnaire/machine";
import { questionnaireSchema, type Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { isConverged, totalSeconds } from "@/lib/runs/comparison";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { seededRandom } from "@/lib/shared/random";
import { strategyIdSchema, type StrategyId } from "@/lib/shared/strategy-ids";
import { firstEdition } from "@/rules/sets/first-edition";
import { simulateRun, type SimulatedRun } from "./simulate-run";
import type { Theme } from "./story";

export type SavedMachine = Machine & { id: string };

export type DemonstrationCase = {
  number: number;
  title: string;
  questionnaire: Questionnaire;
  answers: Answers;
  machineId: string;
  advice: Advice;
  createdAt: Date;
  runs: { run: SimulatedRun; measuredAt: Date; recordedAt: Date }[];
};

export type DemonstrationPlan = { themes: readonly Theme[]; machines: readonly SavedMachine[]; cases: number; runs: number; seed: number; from: Date; until: Date };

const degreesOfFreedom = [60_000, 150_000, 400_000, 900_000, 2_000_000, 5_000_000];

/**
 * A team's invented record, made from the model with noise and deliberate surprises. Cases come in order of time, each advised with the
 * record as it stood then, so that the evidence grows as a real team's would. The same plan gives the same record.
 */
export async function demonstrationCases(plan: DemonstrationPlan): Promise<DemonstrationCase[]> {
  const random = seededRandom(plan.seed);
  const made: DemonstrationCase[] = [];
  const record: RecordedRuns[] = [];
  const step = (plan.until.getTime() - plan.from.getTime()) / plan.cases;
  for (let index = 0; index < plan.cases; index++) {
    const createdAt = new Date(plan.from.getTime() + step * (index + 0.6 * random()));
    const one = await demonstrationCase(plan, index, createdAt, record, random);
    made.push(one);
    record.push(recordedRuns(one));
  }
  return made;
}

async function demonstrationCase(plan: DemonstrationPlan, index: number, createdAt: Date, record: readonly RecordedRuns[], random: () => number): Promise<DemonstrationCase> {
  const theme = pick(plan.themes, random);
  const machine = plan.machines[theme.machine];
  if (!machine) throw new Error("A theme names a machine that its team does not have.");
  const number = index + 1;
  const questionnaire = questionnaireOf(theme, machine, random);
  const answers = toAnswers(questionnaire, sheetOf(machine));
  const title = `${questionnaire.title}, ${shortCount(computeSizes(answers).unknowns)} unknowns`;
  const evidence = readRecord(record, firstEdition, latestRecord(record.length, createdAt));
  const advice = await computeAdvice({ answers, ruleSet: firstEdition, editionNumber: 1, evidence, caseId: caseKey(number) });
  return { number, title, questionnaire: { ...questionnaire, title }, answers, machineId: machine.id, advice, createdAt, runs: runsOf(plan, index, advice, answers, createdAt, random) };
}

function questionnaireOf(theme: Theme, machine: SavedMachine, random: () => number): Questionnaire {
  const unknowns = Math.round(pick(degreesOfFreedom, random) * (0.7 + 0.6 * random()));
  const capabilities = theme.answers.available ?? [...defaultQuestionnaire.available, ...extraCapabilities(random)];
  return questionnaireSchema.parse({
    ...defaultQuestionnaire,
    ...theme.answers,
    title: theme.title,
    size: { by: "unknowns", value: unknowns },
    tolerance: pick([1e-6, 1e-6, 1e-8], random),
    hardware: { machineId: machine.id, cores: theme.cores, timeLimitSeconds: random() < 0.3 ? 7200 : null },
    available: capabilities,
  });
}

function extraCapabilities(random: () => number) {
  const extras = ["augmented-assembly", "hybridised-assembly", "discrete-gradient-curl"] as const;
  return extras.filter(() => random() < 0.35);
}

/** The first strategy nearly always, alternatives as often as the plan's number of runs allows, so that hit rates mean something. */
function runsOf(plan: DemonstrationPlan, index: number, advice: Advice, answers: Answers, createdAt: Date, random: () => number): DemonstrationCase["runs"] {
  const ranked = advice.ranking.filter((entry) => entry.status === "ranked");
  const share = plan.runs / plan.cases;
  // The last few cases have no run yet: a desk always has some that are still in the queue.
  const wanted = index >= plan.cases - 4 ? 0 : Math.min(ranked.length, Math.round(share * (0.55 + 1.1 * random())));
  return ranked.slice(0, wanted).map((entry, order) => {
    const run = simulateRun(entry.strategy, answers, entry.estimate, random);
    const measuredAt = new Date(createdAt.getTime() + (order + 1) * 3 * 3_600_000 + random() * 86_400_000);
    return { run, measuredAt, recordedAt: new Date(measuredAt.getTime() + 1_800_000) };
  });
}

function recordedRuns(one: DemonstrationCase): RecordedRuns {
  const { tolerance, repeatedSolves, hardware } = one.answers;
  const runs = one.runs.flatMap(({ run }) => {
    const total = totalSeconds(run, repeatedSolves);
    if (total === null || !isConverged(run, tolerance)) return [];
    return [{ strategy: knownStrategy(run.strategy), strategyName: run.strategy, cores: hardware.cores, totalSeconds: total }];
  });
  return { caseId: caseKey(one.number), caseNumber: one.number, title: one.title, answers: one.answers, runs };
}

function knownStrategy(strategy: string): StrategyId | null {
  const parsed = strategyIdSchema.safeParse(strategy);
  return parsed.success ? parsed.data : null;
}

/** Stands for a case's id until the database has given one; nearest cases are stored with real ids. */
function caseKey(number: number): string {
  return `case-${number}`;
}

function latestRecord(cases: number, at: Date): string {
  return cases === 0 ? "" : at.toISOString();
}

function sheetOf({ id: _id, ...machine }: SavedMachine): Machine {
  return machine;
}

function pick<Item>(items: readonly Item[], random: () => number): Item {
  const item = items[Math.floor(random() * items.length)];
  if (item === undefined) throw new Error("Nothing to choose from.");
  return item;
}

function shortCount(value: number): string {
  return value >= 1e6 ? `${(value / 1e6).toFixed(1)} M` : `${Math.round(value / 1000)} k`;
}
