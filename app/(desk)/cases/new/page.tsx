import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { Sheet } from "@/components/layout/sheet";
import { Notice } from "@/components/ui/notice";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { toFormValues } from "@/lib/questionnaire/form-values";
import { AppError } from "@/lib/shared/app-error";
import { copyCase } from "@/lib/use-cases/cases/copy-case";
import { listMachines } from "@/lib/use-cases/machines/list-machines";
import { NewCase } from "./new-case";

export const metadata: Metadata = { title: "New case" };

/** The questionnaire, empty or filled from the case named by `?from=`. */
export default async function NewCasePage({ searchParams }: { searchParams: Promise<{ from?: string | string[] }> }) {
  const actor = await requireActor();
  if (!mayRole(actor.role, "cases:write")) {
    return (
      <Sheet>
        <PageTitle title="New case" />
        <Notice tone="warn" title="Observers read, they do not add">
          Ask an owner of the team for the role of analyst to describe cases of your own.
        </Notice>
      </Sheet>
    );
  }
  const { from } = await searchParams;
  const [machines, copied] = await Promise.all([listMachines(actor, { limit: 200 }), typeof from === "string" ? readCopy(actor, from) : null]);
  return (
    <NewCase
      key={from?.toString() ?? "new"}
      team={actor.teamId}
      copiedFrom={copied === null ? null : (from?.toString() ?? null)}
      copyMissing={typeof from === "string" && copied === null}
      initial={toFormValues(copied ?? defaultQuestionnaire)}
      machines={machines.items}
      mayAddMachines={mayRole(actor.role, "machines:add")}
    />
  );
}

async function readCopy(actor: Awaited<ReturnType<typeof requireActor>>, id: string) {
  try {
    return await copyCase(actor, { caseRef: id });
  } catch (error) {
    if (error instanceof AppError && (error.code === "not-found" || error.code === "invalid")) return null;
    throw error;
  }
}
