import { failureResponse } from "@/lib/api/responses";
import { AppError } from "@/lib/shared/app-error";

/** Every other path below /api/v1: problem details instead of a page. */
async function notThere(): Promise<Response> {
  return failureResponse(new AppError("not-found", "There is nothing at this address; /api/v1/openapi.json lists what is."), "path");
}

export { notThere as DELETE, notThere as GET, notThere as PATCH, notThere as POST, notThere as PUT };
