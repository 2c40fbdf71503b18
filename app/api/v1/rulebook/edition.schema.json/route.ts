import { editionSchemaDocument } from "@/lib/api/edition-schema";
import { jsonResponse } from "@/lib/api/responses";
import { apiMethods } from "@/lib/api/route";
import { readAuthSettings } from "@/lib/auth/settings";

/** The form of an exported edition is public: it says what a rule may be, not what any team's are. */
export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: async () => jsonResponse(editionSchemaDocument(readAuthSettings().baseUrl), 200, { "content-type": "application/schema+json; charset=utf-8" }),
});
