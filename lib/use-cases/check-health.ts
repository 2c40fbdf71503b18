import { pingDatabase } from "@/db/queries/ping";

export type Health = { status: "ok" | "unavailable"; database: "ok" | "unreachable" };

/** Whether the service can do its work; public, so it says nothing about how it is built. */
export async function checkHealth(): Promise<Health> {
  try {
    await pingDatabase();
    return { status: "ok", database: "ok" };
  } catch {
    return { status: "unavailable", database: "unreachable" };
  }
}
