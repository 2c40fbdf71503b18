import { openApiDocument } from "@/lib/api/openapi";
import { jsonResponse } from "@/lib/api/responses";
import { apiMethods } from "@/lib/api/route";
import { readAuthSettings } from "@/lib/auth/settings";

/** The API's description is public: it says what may be asked, not what is stored. */
export const { GET, POST, PUT, PATCH, DELETE } = apiMethods({
  GET: async () => jsonResponse(openApiDocument(readAuthSettings().baseUrl), 200),
});
