import { jobDefinitions, type JobName } from "../definitions";
import { handleDeliverWebhook } from "./deliver-webhook";
import { handlePrepareTeam } from "./prepare-team";
import { handleRunReplay } from "./run-replay";
import { handleSearchProposals } from "./search-proposals";
import { handleSendEmail } from "./send-email";

const handlers: Record<JobName, (data: unknown) => Promise<void>> = {
  "send-email": async (data) => handleSendEmail(jobDefinitions["send-email"].payload.parse(data)),
  "prepare-team": async (data) => handlePrepareTeam(jobDefinitions["prepare-team"].payload.parse(data)),
  "deliver-webhook": async (data) => handleDeliverWebhook(jobDefinitions["deliver-webhook"].payload.parse(data)),
  "run-replay": async (data) => handleRunReplay(jobDefinitions["run-replay"].payload.parse(data)),
  "search-proposals": async (data) => handleSearchProposals(jobDefinitions["search-proposals"].payload.parse(data)),
};

/** Every kind of job the worker takes. */
export const jobNames: readonly JobName[] = Object.keys(jobDefinitions).filter((name): name is JobName => name in handlers);

/** Parses a job's data and does its work. Throws when the data does not fit or the work fails; the queue then tries again. */
export function handleJob(name: JobName, data: unknown): Promise<void> {
  return handlers[name](data);
}
