/** The address a request came from: the last hop's word, which a client behind a proxy can't forge; "unknown" without one. */
export function clientAddress(headers: Headers | undefined): string {
  const hops = (headers?.get("x-forwarded-for") ?? "").split(",").map((hop) => hop.trim());
  return hops.at(-1) || "unknown";
}
