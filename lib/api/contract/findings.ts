import { z } from "zod";
import { findingSeverities, findings } from "@/lib/runs/diagnosis/findings";

const findingIds = Object.keys(findings).filter((id): id is keyof typeof findings => Object.hasOwn(findings, id));

/** Something conspicuous about a run, with its numbers, the lines of the log that show it, and what to try next. */
export const findingSchema = z.object({
  id: z.enum(findingIds),
  title: z.string(),
  severity: z.enum(findingSeverities),
  text: z.string(),
  whatToTry: z.string(),
  source: z.object({ kind: z.enum(["published", "common-practice", "measured"]), citation: z.string() }),
  evidence: z.record(z.string(), z.union([z.number(), z.string()])),
  lines: z.array(z.int()),
});
export type FindingView = z.infer<typeof findingSchema>;
