import { runSearch } from "@/lib/use-cases/refinement/run-search";
import type { JobPayload } from "../definitions";

/** Searches the record for refinements; cut off in the middle, it begins anew. */
export function handleSearchProposals(payload: JobPayload<"search-proposals">): Promise<void> {
  return runSearch(payload);
}
