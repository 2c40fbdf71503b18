import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { parameterCatalogue } from "@/lib/advice/parameter-catalogue";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { AppError } from "@/lib/shared/app-error";
import { getDraft } from "@/lib/use-cases/rulebook/get-draft";
import { DraftDesk } from "./draft-desk";

export const metadata: Metadata = { title: "Draft" };

/** A draft of the next edition: its editor, what it changes, its replays, its approval. */
export default async function DraftPage({ params }: { params: Promise<{ id: string }> }) {
  const actor = await requireActor();
  const { id } = await params;
  const draft = await getDraft(actor, { id }).catch((error: unknown) => {
    if (error instanceof AppError && (error.code === "not-found" || error.code === "invalid")) notFound();
    throw error;
  });
  return <DraftDesk initial={draft} catalogue={parameterCatalogue} mayEdit={mayRole(actor.role, "rulebook:edit")} />;
}
