import { editionJsonSchema } from "@/rules/edition-json-schema";

/** Where the schema of an exported edition is published. */
export const editionSchemaPath = "/api/v1/rulebook/edition.schema.json";

/** JSON Schema (2020-12) of an exported edition under its own address. */
export function editionSchemaDocument(baseUrl: string): Record<string, unknown> {
  return { $id: new URL(editionSchemaPath, baseUrl).href, ...editionJsonSchema() };
}
