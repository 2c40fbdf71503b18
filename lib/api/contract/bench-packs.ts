import { z } from "zod";
import { strategyIds } from "@/lib/shared/strategy-ids";
import { defineOperation } from "../operation";
import { caseParams } from "./common";

/** Strategies in the address, separated by commas, in the order in which they are to run. */
const strategiesQuery = z
  .string()
  .max(400)
  .transform((text) => [...new Set(text.split(",").map((name) => name.trim()))])
  .pipe(z.array(z.enum(strategyIds, "This is no strategy's id.")).min(1));

export const benchPackOperations = {
  benchPack: defineOperation({
    id: "benchPack",
    method: "GET",
    path: "/api/v1/cases/{id}/bench-pack",
    tag: "Bench packs",
    summary: "An archive that runs several strategies with your own program on your own cluster and reports back",
    permission: "cases:read",
    params: caseParams,
    query: z.strictObject({ strategies: strategiesQuery }),
    response: { kind: "other", mediaTypes: ["application/gzip"], description: "A .tar.gz with an options file for each strategy, a POSIX shell driver and a README" },
  }),
};
