/** Where to go after signing in: `next` if it is an address of this site, else the cases. */
export function safeNext(next: string | null | undefined): string {
  const fallback = "/cases";
  if (!next?.startsWith("/")) return fallback;
  try {
    // Parsing settles what browsers make of "//host", "/\host" and control characters.
    const url = new URL(next, "http://here.invalid");
    return url.origin === "http://here.invalid" ? `${url.pathname}${url.search}${url.hash}` : fallback;
  } catch {
    return fallback;
  }
}
