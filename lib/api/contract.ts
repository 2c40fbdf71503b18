import { adviceOperations } from "./contract/advice";
import { benchPackOperations } from "./contract/bench-packs";
import { caseOperations } from "./contract/cases";
import { draftOperations } from "./contract/drafts";
import { logOperations } from "./contract/logs";
import { machineOperations } from "./contract/machines";
import { recordOperations } from "./contract/record";
import { refinementOperations } from "./contract/refinement";
import { runOperations } from "./contract/runs";
import { webhookOperations } from "./contract/webhooks";
import type { Operation } from "./operation";

/** Every call of the API. Routes, the browser's fetcher, the published description and the tests all work from it. */
export const operations = {
  ...adviceOperations,
  ...caseOperations,
  ...runOperations,
  ...logOperations,
  ...benchPackOperations,
  ...machineOperations,
  ...webhookOperations,
  ...recordOperations,
  ...draftOperations,
  ...refinementOperations,
} satisfies Record<string, Operation>;
export type OperationId = keyof typeof operations;
