import type { Metadata } from "next";
import { requireActor } from "@/lib/auth/actor";
import { HitRatesView } from "./hit-rates-view";

export const metadata: Metadata = { title: "Hit rates" };

export default async function HitRatesPage() {
  await requireActor();
  return <HitRatesView />;
}
