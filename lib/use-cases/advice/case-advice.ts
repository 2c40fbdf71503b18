import { findMachine } from "@/db/queries/machines";
import type { TeamDatabase } from "@/db/scope";
import type { Advice } from "@/lib/advice/advice";
import { computeAdvice } from "@/lib/advice/pipeline";
import type { Scope } from "@/lib/auth/guard";
import { toAnswers, type Answers } from "@/lib/questionnaire/answers";
import type { Questionnaire } from "@/lib/questionnaire/questionnaire-schema";
import { AppError, type FieldError } from "@/lib/shared/app-error";
import { checkSizes } from "@/lib/sizes/check-sizes";
import { computeSizes } from "@/lib/sizes/compute-sizes";
import { machineSheet } from "@/lib/use-cases/machines/machine-view";
import { adviceBasis } from "./team-evidence";

/**
 * The answers behind a questionnaire: machine sheet looked up, sizes checked. `place` is where the questionnaire stands in what was
 * sent, "" or "questionnaire". Throws AppError "invalid" with the fields at fault.
 */
export async function resolveAnswers(db: TeamDatabase, scope: Scope, questionnaire: Questionnaire, place: string): Promise<Answers> {
  const { machineId, cores } = questionnaire.hardware;
  const machine = machineId === undefined ? null : await findMachine(db, scope, machineId);
  if (machineId !== undefined && machine === null) {
    throw refused(place, [{ path: "hardware.machineId", message: "This team has no such machine sheet." }]);
  }
  if (machine !== null && cores > machine.coresPerNode * machine.nodes) {
    throw refused(place, [{ path: "hardware.cores", message: `${machine.name} has ${machine.coresPerNode * machine.nodes} cores; choose at most as many.` }]);
  }
  const answers = toAnswers(questionnaire, machine === null ? null : machineSheet(machine));
  const errors = checkSizes(answers, computeSizes(answers));
  if (errors.length > 0) throw refused(place, errors);
  return answers;
}

/** Advice under the live edition and the present record; saves nothing. */
export async function adviseOn(db: TeamDatabase, scope: Scope, answers: Answers, caseId: string | null = null): Promise<Advice> {
  return computeAdvice({ answers, ...(await adviceBasis(db, scope)), caseId });
}

function refused(place: string, errors: readonly FieldError[]): AppError {
  const fields = errors.map(({ path, message }) => ({ path: place === "" ? path : `${place}.${path}`, message }));
  return new AppError("invalid", "Some answers can't be used.", { fields });
}
