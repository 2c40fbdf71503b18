import { readdirSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { z } from "zod";
import { operations } from "@/lib/api/contract";
import { decodeCursor, encodeCursor } from "@/lib/api/cursor";
import { openApiDocument } from "@/lib/api/openapi";
import type { Operation } from "@/lib/api/operation";
import { codeOfProblem, problemOf, problemSchema } from "@/lib/api/problem";
import { unstorableText } from "@/lib/api/read-body";
import { failureResponse } from "@/lib/api/responses";
import { defaultQuestionnaire } from "@/lib/questionnaire/default-questionnaire";
import { AppError, errorCodes, httpStatus } from "@/lib/shared/app-error";

const all: readonly Operation[] = Object.values(operations);
const documentSchema = z.object({
  openapi: z.literal("3.1.0"),
  paths: z.record(z.string(), z.record(z.string(), z.looseObject({ operationId: z.string(), responses: z.record(z.string(), z.unknown()), parameters: z.array(z.looseObject({ name: z.string(), in: z.string() })) }))),
});
const text = JSON.stringify(openApiDocument("https://saddlemark.example"));
const document = documentSchema.parse(JSON.parse(text));

describe("the published description", () => {
  it("holds every operation under its method and path, once", () => {
    const described = Object.entries(document.paths).flatMap(([path, methods]) => Object.entries(methods).map(([method, { operationId }]) => `${method.toUpperCase()} ${path} ${operationId}`));
    expect(described.sort()).toEqual(all.map(({ method, path, id }) => `${method} ${path} ${id}`).sort());
    expect(Object.entries(operations).every(([name, { id }]) => name === id)).toBe(true);
  });

  it("declares every path parameter of every path", () => {
    for (const operation of all) {
      const inPath = [...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name).sort();
      const declared = document.paths[operation.path]?.[operation.method.toLowerCase()]?.parameters.filter((parameter) => parameter.in === "path").map(({ name }) => name) ?? [];
      expect(declared.sort(), operation.id).toEqual(inPath);
    }
  });

  it("has a route file for every path, and every route file a path", () => {
    const root = new URL("../../../app/api/v1/", import.meta.url);
    const files = readdirSync(root, { recursive: true, encoding: "utf8" }).filter((name) => name.endsWith("route.ts"));
    const served = files.map((name) => `/api/v1/${name.replaceAll("\\", "/").replace(/\/?route\.ts$/, "").replace(/\[(\w+)\]/g, "{$1}")}`);
    const others = ["/api/v1/openapi.json", "/api/v1/rulebook/edition.schema.json", "/api/v1/[[...path]]"];
    expect(served.filter((path) => !others.includes(path)).sort()).toEqual([...new Set(all.map(({ path }) => String(path)))].sort());
  });

  it("leaves no reference without its target", () => {
    const references = [...text.matchAll(/"\$ref":"([^"]+)"/g)].map(([, target]) => target);
    expect([...new Set(references)]).toEqual(["#/components/schemas/Problem"]);
  });

  it("describes a questionnaire by its fields, the required ones marked", () => {
    const post = z.looseObject({ requestBody: z.object({ required: z.literal(true), content: z.object({ "application/json": z.object({ schema: z.looseObject({ properties: z.record(z.string(), z.unknown()), required: z.array(z.string()), additionalProperties: z.literal(false) }) }) }) }) });
    const { schema } = post.parse(document.paths["/api/v1/advice"]?.post).requestBody.content["application/json"];
    for (const name of Object.keys(defaultQuestionnaire)) expect(schema.properties).toHaveProperty(name);
    expect(schema.required).toContain("discretisation");
    expect(schema.required).not.toContain("title");
  });
});

describe("problem details", () => {
  it.each(errorCodes)("of %s carry its status and lead back to its code", (code) => {
    const problem = problemSchema.parse(problemOf(new AppError(code, "Words.", { fields: [{ path: "a.b", message: "No." }], detail: "secret" })));
    expect(problem.status).toBe(httpStatus[code]);
    expect(codeOfProblem(problem)).toBe(code);
    expect(JSON.stringify(problem)).not.toContain("secret");
  });

  it("of an unexpected failure show nothing of it", async () => {
    const logged: unknown[] = [];
    const original = console.error;
    console.error = (...words: unknown[]) => void logged.push(...words);
    const response = failureResponse(new Error("Failed query: insert ... params: hunter2", { cause: Object.assign(new Error("duplicate key"), { code: "23505" }) }), "test");
    console.error = original;
    expect(response.status).toBe(500);
    expect(await response.text()).not.toContain("hunter2");
    expect(logged.join(" ")).toContain("23505");
    expect(logged.join(" ")).not.toContain("hunter2");
  });

  it("of a database that is away ask to try again", () => {
    const original = console.error;
    console.error = () => undefined;
    const response = failureResponse(new Error("Failed query", { cause: Object.assign(new Error("refused"), { code: "ECONNREFUSED" }) }), "test");
    console.error = original;
    expect([response.status, response.headers.get("retry-after")]).toEqual([503, "5"]);
  });
});

describe("cursors", () => {
  const place = z.tuple([z.string(), z.int()]);
  it("come back as they went, and only into their own list", () => {
    const cursor = encodeCursor("title", ["ångström, \"x\"", 12]);
    expect(decodeCursor(cursor, "title", place)).toEqual(["ångström, \"x\"", 12]);
    expect(decodeCursor(undefined, "title", place)).toBeNull();
    expect(() => decodeCursor(cursor, "-title", place)).toThrow(AppError);
  });
  it.each(["", "!", "e30", "bnVsbA", "W10", Buffer.from('["title",1,1]').toString("base64url"), Buffer.from('["title","\\u0000",1]').toString("base64url")])("refuse %j", (cursor) => {
    expect(() => decodeCursor(cursor, "title", place)).toThrow(AppError);
  });
});

describe("unstorableText", () => {
  it.each([
    [{ a: "x\u0000" }, "a"],
    [{ a: [{ b: "\ud800" }] }, "a.0.b"],
    [{ a: { "k\u0000": 1 } }, "a"],
    ["\udc00", ""],
  ])("finds %j at %j", (value, path) => {
    expect(unstorableText(value).map((error) => error.path)).toEqual([path]);
  });
  it("passes whole surrogate pairs and every other character", () => {
    expect(unstorableText({ a: "😀 ∞ \n\t", b: [1, null, true] })).toEqual([]);
  });
});
