import { z } from "zod";
import { emailSchema } from "@/lib/email/email";

/** Schema of the queue's tables. */
export const jobSchemaName = "jobs";

/**
 * Every kind of job with its payload. Tries are repeated with growing pauses; what fails to the end lies in the queue
 * "<name>.failed". A new kind is a line here and a handler in lib/jobs/handlers.
 */
export const jobDefinitions = {
  "send-email": { payload: emailSchema, retryLimit: 8, retryDelaySeconds: 5, expireSeconds: 120 },
  "prepare-team": { payload: z.strictObject({ teamId: z.string().min(1), ownerId: z.string().min(1) }), retryLimit: 8, retryDelaySeconds: 5, expireSeconds: 120 },
  // Nine tries with doubled pauses reach over about an hour and a half: a receiver may restart in between.
  "deliver-webhook": { payload: z.strictObject({ teamId: z.string().min(1), deliveryId: z.uuid() }), retryLimit: 8, retryDelaySeconds: 20, expireSeconds: 60 },
  // Long work; a worker that starts takes up at once what a killed one had begun (requeue-interrupted).
  "run-replay": { payload: z.strictObject({ teamId: z.string().min(1), replayId: z.uuid() }), retryLimit: 4, retryDelaySeconds: 5, expireSeconds: 900 },
  "search-proposals": { payload: z.strictObject({ teamId: z.string().min(1), searchId: z.uuid() }), retryLimit: 4, retryDelaySeconds: 5, expireSeconds: 900 },
} as const;

export type JobName = keyof typeof jobDefinitions;
export type JobPayload<Name extends JobName> = z.infer<(typeof jobDefinitions)[Name]["payload"]>;

/** The settings of one queue as pg-boss wants them. Throws on an unknown name. */
export function queueSettings(name: string): QueueSettings {
  const entry = Object.entries(jobDefinitions).find(([known]) => known === name);
  if (!entry) throw new Error(`There is no job named ${name}.`);
  const [, definition] = entry;
  return {
    name,
    policy: "standard",
    retryLimit: definition.retryLimit,
    retryDelay: definition.retryDelaySeconds,
    retryBackoff: true,
    expireInSeconds: definition.expireSeconds,
    deadLetter: `${name}.failed`,
  };
}

type QueueSettings = {
  name: string;
  policy: "standard";
  retryLimit: number;
  retryDelay: number;
  retryBackoff: true;
  expireInSeconds: number;
  deadLetter: string;
};
