import { z } from "zod";
import { strategyIds } from "./strategy-id-list";

export { strategyIds, type StrategyId } from "./strategy-id-list";

export const strategyIdSchema = z.enum(strategyIds);
