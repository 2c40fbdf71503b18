import { gzipSync } from "node:zlib";
import { z } from "zod";
import { withTeam, type TeamDatabase } from "@/db/scope";
import { caseRefSchema } from "@/lib/api/contract/common";
import { defineUseCase, type Scope } from "@/lib/auth/guard";
import { readAuthSettings } from "@/lib/auth/settings";
import { benchPackFiles, packFolder, runnable, type BenchPack, type PackCandidate } from "@/lib/bench-pack/bench-pack";
import { writeTar } from "@/lib/bench-pack/write-tar";
import { AppError } from "@/lib/shared/app-error";
import { strategyIdSchema, type StrategyId } from "@/lib/shared/strategy-ids";
import { strategies as definitions } from "@/lib/strategies";
import { renderStrategy } from "@/lib/use-cases/cases/read-strategy-files";

export type PackFile = { filename: string; bytes: Uint8Array<ArrayBuffer> };

/** The archive that runs the chosen strategies with the user's program; the same case, advice and choice always give the same bytes. */
export const makeBenchPack = defineUseCase({
  permission: "cases:read",
  input: z.strictObject({ caseRef: caseRefSchema, strategies: z.tuple([strategyIdSchema], strategyIdSchema) }),
  run: ({ scope }, { caseRef, strategies }): Promise<PackFile> =>
    withTeam(scope, async (db) => {
      const [first, ...others] = strategies;
      const rendered = await render(db, scope, caseRef, first);
      const pack: BenchPack = {
        caseNumber: rendered.number,
        title: rendered.title,
        hardware: rendered.answers.hardware,
        baseUrl: readAuthSettings().baseUrl,
        candidates: [rendered.candidate],
      };
      for (const strategy of others) pack.candidates.push((await render(db, scope, caseRef, strategy)).candidate);
      if (runnable(pack).length === 0) {
        const message = "None of these can be run by options alone; each has a recipe on the case's page. Choose another one.";
        throw new AppError("invalid", message, { fields: [{ path: "strategies", message }] });
      }
      const archive = gzipSync(writeTar(benchPackFiles(pack), rendered.givenAt), { level: 9 });
      return { filename: `${packFolder(pack)}.tar.gz`, bytes: new Uint8Array(archive) };
    }),
});

async function render(db: TeamDatabase, scope: Scope, caseRef: string, strategy: StrategyId) {
  const { number, title, givenAt, context, entry, file, recipe } = await renderStrategy(db, scope, caseRef, strategy);
  const { totalSeconds, memoryGiB } = entry.estimate;
  const candidate: PackCandidate = { strategy, name: definitions[strategy].name, file, recipe, totalSecondsHigh: totalSeconds.high, memoryGiBHigh: memoryGiB.high };
  return { number, title, givenAt, answers: context.answers, candidate };
}
