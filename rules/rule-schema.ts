import { z } from "zod";
import { strategyIdSchema } from "@/lib/shared/strategy-ids";

/** Where a rule comes from. */
export const ruleSourceSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("common-practice") }),
  z.strictObject({ kind: z.literal("published"), citation: z.string().trim().min(1).max(400) }),
  z.strictObject({ kind: z.literal("team-evidence"), numbers: z.string().trim().min(1).max(400) }),
]);
export type RuleSource = z.infer<typeof ruleSourceSchema>;

const factorSchema = z.number().min(1).max(100);

/** What a rule does when it fires. Factors are in time: favour by 2 halves the score, disfavour by 2 doubles it, 1 gives the rationale alone. */
export const effectSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("favour"), strategy: strategyIdSchema, factor: factorSchema }),
  z.strictObject({ kind: z.literal("disfavour"), strategy: strategyIdSchema, factor: factorSchema }),
  z.strictObject({ kind: z.literal("exclude"), strategy: strategyIdSchema, reason: z.string().trim().min(1).max(400) }),
  z.strictObject({
    kind: z.literal("set"),
    strategy: strategyIdSchema,
    parameter: z.string().trim().min(1).max(60),
    value: z.union([z.number(), z.string().max(120)]),
  }),
  z.strictObject({ kind: z.literal("caution"), strategy: strategyIdSchema.nullable(), text: z.string().trim().min(1).max(400) }),
  z.strictObject({ kind: z.literal("fallback"), strategy: strategyIdSchema, to: strategyIdSchema, when: z.string().trim().min(1).max(300) }),
]);
export type Effect = z.infer<typeof effectSchema>;

export const comparisonOperators = [
  "equal",
  "notEqual",
  "lessThan",
  "lessThanInclusive",
  "greaterThan",
  "greaterThanInclusive",
  "in",
  "notIn",
  "contains",
  "doesNotContain",
] as const;
export type ComparisonOperator = (typeof comparisonOperators)[number];

const valueSchema = z.union([z.number(), z.string(), z.boolean(), z.array(z.union([z.number(), z.string()]))]);

export type Comparison = { fact: string; operator: ComparisonOperator; value: z.infer<typeof valueSchema> };
/** Condition in json-rules-engine's own form; `not` is "none of" when it wraps an `any`. */
export type Condition = Comparison | { all: Condition[] } | { any: Condition[] } | { not: Condition };

const comparisonSchema = z.strictObject({ fact: z.string(), operator: z.enum(comparisonOperators), value: valueSchema });

export const conditionSchema: z.ZodType<Condition> = z.lazy(() =>
  z.union([
    comparisonSchema,
    z.strictObject({ all: z.array(conditionSchema).min(1) }),
    z.strictObject({ any: z.array(conditionSchema).min(1) }),
    z.strictObject({ not: conditionSchema }),
  ]),
);

export const ruleSchema = z.strictObject({
  /** Short stable name in kebab case, unique in its edition. */
  id: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, "A rule's id is lower-case words joined by hyphens.").max(80),
  title: z.string().trim().min(1).max(160),
  enabled: z.boolean().default(true),
  when: conditionSchema,
  then: z.array(effectSchema).min(1).max(20),
  rationale: z.string().trim().min(1).max(800),
  source: ruleSourceSchema,
});
export type Rule = z.infer<typeof ruleSchema>;

/** The content of an edition: rules in the order in which they are read. */
export const ruleSetSchema = z.array(ruleSchema).max(500).superRefine((rules, context) => {
  const seen = new Set<string>();
  rules.forEach((rule, index) => {
    if (seen.has(rule.id)) context.addIssue({ code: "custom", path: [index, "id"], message: `The id ${rule.id} is used twice.` });
    seen.add(rule.id);
  });
});
export type RuleSet = z.infer<typeof ruleSetSchema>;
