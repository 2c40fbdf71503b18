import type { Metadata } from "next";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { ProposalDesk } from "./proposal-desk";

export const metadata: Metadata = { title: "Proposals" };

export default async function ProposalsPage() {
  const actor = await requireActor();
  return <ProposalDesk mayEdit={mayRole(actor.role, "rulebook:edit")} />;
}
