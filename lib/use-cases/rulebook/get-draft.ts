import { z } from "zod";
import { withTeam } from "@/db/scope";
import type { DraftView } from "@/lib/api/contract/drafts";
import { defineUseCase } from "@/lib/auth/guard";
import { readDraft } from "./draft-view";

/** One draft with its problems and its difference from the live edition. */
export const getDraft = defineUseCase({
  permission: "rulebook:read",
  input: z.strictObject({ id: z.uuid() }),
  run: ({ scope }, { id }): Promise<DraftView> => withTeam(scope, (db) => readDraft(db, scope, id)),
});
