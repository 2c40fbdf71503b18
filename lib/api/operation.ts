import type { z } from "zod";
import type { Permission } from "@/lib/auth/permissions";

export const methods = ["GET", "POST", "PATCH", "DELETE"] as const;
export type Method = (typeof methods)[number];

/** Body of a request: JSON of a schema, or one of the listed media types, streamed. */
export type RequestBody = { kind: "json"; schema: z.ZodType } | { kind: "stream"; mediaTypes: readonly string[]; description: string };

/** What a call answers when it goes well; problem details are the same for all. */
export type ResponseBody = { kind: "json"; schema: z.ZodType } | { kind: "other"; mediaTypes: readonly string[]; description: string };

/** One call of the API: the single definition from which its checks and its published description follow. */
export type Operation = {
  id: string;
  method: Method;
  /** Path with parameters in braces, as OpenAPI writes it. */
  path: `/api/v1/${string}`;
  tag: string;
  summary: string;
  permission: Permission;
  params: z.ZodObject | null;
  query: z.ZodObject | null;
  body: RequestBody | null;
  status: 200 | 201;
  response: ResponseBody;
  /** Honours Idempotency-Key: the same key and body again answer 200 with what was answered first. */
  idempotent: boolean;
};

type Optional = "params" | "query" | "body" | "status" | "idempotent";
type OperationDefinition = Omit<Operation, Optional> & Partial<Pick<Operation, Optional>>;
const defaults = { params: null, query: null, body: null, status: 200, idempotent: false } as const;

/** Fills in what most calls share and keeps the schemas' types. */
export function defineOperation<const Definition extends OperationDefinition>(definition: Definition): Omit<typeof defaults, keyof Definition> & Definition {
  return { ...defaults, ...definition };
}

type OutputOf<Schema> = Schema extends z.ZodType ? z.output<Schema> : Record<string, never>;

/** The checked parts of a request. */
export type RequestParts<Op extends Operation> = {
  params: OutputOf<Op["params"]>;
  query: OutputOf<Op["query"]>;
  body: Op["body"] extends { kind: "json"; schema: infer Schema extends z.ZodType } ? z.output<Schema> : null;
  idempotencyKey: string | null;
  request: Request;
};

/** What the handler of a call hands back to be sent. */
export type ResponseContent<Op extends Operation> = Op["response"] extends { kind: "json"; schema: infer Schema extends z.ZodType } ? z.input<Schema> : Response;
