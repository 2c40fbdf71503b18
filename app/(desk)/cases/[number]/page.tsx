import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { AppError } from "@/lib/shared/app-error";
import { getCase } from "@/lib/use-cases/cases/get-case";
import { CaseView } from "./case-view";

type CasePageProps = { params: Promise<{ number: string }> };

export async function generateMetadata({ params }: CasePageProps): Promise<Metadata> {
  const { number } = await params;
  return { title: /^[1-9]\d{0,8}$/.test(number) ? `Case ${number}` : "Case" };
}

/** One case: its advice, its runs. A case of another team is as absent as one that never was. */
export default async function CasePage({ params }: CasePageProps) {
  const actor = await requireActor();
  const { number } = await params;
  const detail = await getCase(actor, { caseRef: number }).catch((error: unknown) => {
    if (error instanceof AppError && (error.code === "not-found" || error.code === "invalid")) notFound();
    throw error;
  });
  return <CaseView reference={number} initial={detail} mayWrite={mayRole(actor.role, "runs:write")} />;
}
