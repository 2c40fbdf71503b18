import { getAuth } from "@/lib/auth/auth";
import { isOpenAuthPath } from "@/lib/auth/http-paths";

async function answer(request: Request): Promise<Response> {
  if (!isOpenAuthPath(new URL(request.url).pathname)) {
    const problem = { type: "about:blank", title: "Not found", status: 404, detail: "There is nothing at this address." };
    return Response.json(problem, { status: 404, headers: { "content-type": "application/problem+json" } });
  }
  return getAuth().handler(request);
}

export const GET = answer;
export const POST = answer;
