import type { Metadata } from "next";
import { requireActor } from "@/lib/auth/actor";
import { mayRole } from "@/lib/auth/permissions";
import { listMachines } from "@/lib/use-cases/machines/list-machines";
import { MachineDesk } from "./machine-desk";

export const metadata: Metadata = { title: "Machines" };

export default async function MachinesPage() {
  const actor = await requireActor();
  const machines = await listMachines(actor, { limit: 200 });
  return <MachineDesk initial={machines.items} mayAdd={mayRole(actor.role, "machines:add")} mayManage={mayRole(actor.role, "machines:manage")} />;
}
