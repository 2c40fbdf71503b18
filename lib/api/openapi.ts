import { z } from "zod";
import { httpStatus, type ErrorCode } from "@/lib/shared/app-error";
import { operations } from "./contract";
import type { Operation } from "./operation";
import { problemMediaType, problemSchema } from "./problem";

type JsonObject = { [key: string]: unknown };

/** The published description of the API (OpenAPI 3.1), from the same schemas that check every call. `serverUrl` is the installation's address. */
export function openApiDocument(serverUrl: string): JsonObject {
  const paths: Record<string, Record<string, JsonObject>> = {};
  const all: readonly Operation[] = Object.values(operations);
  for (const operation of all) {
    const methods = (paths[operation.path] ??= {});
    methods[operation.method.toLowerCase()] = describeOperation(operation);
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Saddlemark",
      version: "1",
      description:
        "Advice on linear solvers for mixed finite and virtual elements, and the record of how it turned out. A key belongs to one team; a session cookie acts for its active team. " +
        "Times are wall seconds, memory is in GiB summed over all processes. Advice is an estimate from models and past runs; it is no guarantee.",
    },
    servers: [{ url: serverUrl }],
    security: [{ key: [] }, { session: [] }],
    paths,
    components: {
      securitySchemes: {
        key: { type: "http", scheme: "bearer", description: "An API key of a team, scoped to read or write" },
        session: { type: "apiKey", in: "cookie", name: "saddlemark.session_token" },
      },
      schemas: { Problem: toSchema(problemSchema, "output") },
    },
  };
}

function describeOperation(operation: Operation): JsonObject {
  return {
    operationId: operation.id,
    summary: operation.summary,
    tags: [operation.tag],
    description: `Needs the permission ${operation.permission}.`,
    parameters: [...objectParameters(operation.params, "path"), ...objectParameters(operation.query, "query"), ...headerParameters(operation)],
    ...(operation.body === null ? {} : { requestBody: { required: true, content: requestContent(operation.body) } }),
    responses: { ...successResponses(operation), ...failureResponses(operation) },
  };
}

function objectParameters(schema: z.ZodObject | null, place: "path" | "query"): JsonObject[] {
  if (schema === null) return [];
  return Object.entries(schema.shape).map(([name, field]) => ({
    name,
    in: place,
    required: place === "path",
    schema: toSchema(asSchema(field), "output"),
  }));
}

function headerParameters(operation: Operation): JsonObject[] {
  if (!operation.idempotent) return [];
  const description = "Repeats are safe: the same key with the same body answers 200 with the first answer, with another body 409.";
  return [{ name: "Idempotency-Key", in: "header", required: false, schema: { type: "string", minLength: 1, maxLength: 200 }, description }];
}

function requestContent(body: NonNullable<Operation["body"]>): JsonObject {
  if (body.kind === "json") return { "application/json": { schema: toSchema(body.schema, "input") } };
  return Object.fromEntries(body.mediaTypes.map((type) => [type, { schema: { type: "string", description: body.description } }]));
}

function successResponses(operation: Operation): JsonObject {
  const { response } = operation;
  const content =
    response.kind === "json"
      ? { "application/json": { schema: toSchema(response.schema, "output") } }
      : Object.fromEntries(response.mediaTypes.map((type) => [type, { schema: { type: "string" } }]));
  const success = { [operation.status]: { description: response.kind === "json" ? "Done" : response.description, content } };
  return operation.idempotent && operation.status === 201 ? { ...success, 200: { description: "Already done under this Idempotency-Key", content } } : success;
}

function failureResponses(operation: Operation): JsonObject {
  const codes: ErrorCode[] = ["unauthenticated", "forbidden"];
  if (operation.params !== null) codes.push("not-found");
  if (operation.params !== null || operation.query !== null || operation.body !== null) codes.push("invalid");
  if (operation.body !== null) codes.push("malformed", "too-large", "unsupported-media");
  if (operation.idempotent || operation.method === "PATCH" || operation.method === "DELETE") codes.push("conflict");
  const content = { [problemMediaType]: { schema: { $ref: "#/components/schemas/Problem" } } };
  return Object.fromEntries(codes.map((code) => [httpStatus[code], { description: code, content }]));
}

/** Shape entries are zod's core type; a lone one is wrapped to be read as a schema. */
function asSchema(field: unknown): z.ZodType {
  return field instanceof z.ZodType ? field : z.unknown();
}

function toSchema(schema: z.ZodType, io: "input" | "output"): JsonObject {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: "any", reused: "inline" });
  return relocate(rest);
}

/** Recursive schemas come with definitions of their own; OpenAPI resolves references from the document's root, so they are cut to "anything". */
function relocate(schema: JsonObject): JsonObject {
  const { $defs, ...rest } = schema;
  if ($defs === undefined) return rest;
  const text = JSON.stringify(rest).replace(/\{"\$ref":"#\/\$defs\/[^"]+"\}/g, '{"description":"A condition, nested without limit"}');
  return z.record(z.string(), z.unknown()).parse(JSON.parse(text));
}
