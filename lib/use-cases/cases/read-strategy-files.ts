import { z } from "zod";
import { findCase, listCaseAdvice } from "@/db/queries/cases";
import { withTeam, type TeamDatabase } from "@/db/scope";
import type { StrategyFiles } from "@/lib/api/contract/cases";
import { caseRefSchema } from "@/lib/api/contract/common";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { readAuthSettings } from "@/lib/auth/settings";
import { batchScript } from "@/lib/runs/batch-script";
import { AppError } from "@/lib/shared/app-error";
import { strategyIdSchema, type StrategyId } from "@/lib/shared/strategy-ids";
import { strategies } from "@/lib/strategies";
import { resourceRequests } from "@/lib/strategies/resource-requests";
import type { OptionsFile } from "@/lib/strategies/strategy";
import { caseNotFound, caseRefOf } from "@/lib/use-cases/shared/case-ref";

export type TextFile = { filename: string; text: string };

const input = z.strictObject({ caseRef: caseRefSchema, strategy: strategyIdSchema });

/** The options file of one strategy with the parameters of the latest advice; where options can't express it, the reason and the recipe. */
export const readOptionsFile = defineUseCase({
  permission: "cases:read",
  input,
  run: ({ scope }, { caseRef, strategy }): Promise<TextFile> =>
    withTeam(scope, async (db) => {
      const { number, file, recipe } = await renderStrategy(db, scope, caseRef, strategy);
      if (file.kind === "petsc") return { filename: file.filename, text: file.text };
      const steps = recipe.map((step, index) => `${index + 1}. ${step}`);
      return { filename: `case-${number}-${strategy}.txt`, text: [`Recipe only: ${file.reason}`, "", ...steps, ""].join("\n") };
    }),
});

/** A batch script that runs one strategy on the case's hardware and reports the run. */
export const readBatchScript = defineUseCase({
  permission: "cases:read",
  input,
  run: ({ scope }, { caseRef, strategy }): Promise<TextFile> =>
    withTeam(scope, async (db) => batchScriptOf(strategy, await renderStrategy(db, scope, caseRef, strategy))),
});

/** Options, recipe and batch script of one strategy in one answer. */
export const readStrategyFiles = defineUseCase({
  permission: "cases:read",
  input,
  run: ({ scope }, { caseRef, strategy }): Promise<StrategyFiles> =>
    withTeam(scope, async (db) => {
      const rendered = await renderStrategy(db, scope, caseRef, strategy);
      return { options: rendered.file, recipe: [...rendered.recipe], batchScript: batchScriptOf(strategy, rendered) };
    }),
});

type Rendered = Awaited<ReturnType<typeof renderStrategy>>;

function batchScriptOf(strategy: StrategyId, { number, context, entry, file }: Rendered): TextFile {
  const text = batchScript({
    caseNumber: number,
    strategy,
    hardware: context.answers.hardware,
    requests: resourceRequests({ ...context, totalSecondsHigh: entry.estimate.totalSeconds.high }),
    options: file.kind === "petsc" ? { filename: file.filename, text: file.text } : null,
    baseUrl: readAuthSettings().baseUrl,
  });
  return { filename: `case-${number}-${strategy}.sh`, text };
}

/** The files of one strategy under the latest advice on a case, and what they were written from. Throws AppError "not-found". */
export async function renderStrategy(db: TeamDatabase, scope: Scope, caseRef: string, strategy: StrategyId) {
  const found = await findCase(db, scope, caseRefOf(caseRef));
  if (found === null) throw caseNotFound();
  const [latest] = await listCaseAdvice(db, scope, found.id, 1);
  const entry = latest?.content.ranking.find((ranked) => ranked.strategy === strategy);
  if (latest === undefined || entry === undefined) throw new AppError("not-found", "The latest advice does not speak of this strategy.");
  const { answers, number } = found;
  const { estimate, parameters } = entry;
  const context = { answers, sizes: latest.content.sizes, parameters, iterationsHigh: estimate.iterations.high, memoryGiBHigh: estimate.memoryGiB.high };
  const definition = strategies[strategy];
  const file: OptionsFile = definition.options(context);
  return { number, title: found.title, givenAt: latest.createdAt, context, entry, file, recipe: definition.recipe(context) };
}
