import type { PersonView } from "@/lib/api/contract/common";

/** Somebody behind a row; the name is missing after they left the team. */
export function personView(id: string | null, name: string | null): PersonView {
  return id === null ? null : { id, name };
}
