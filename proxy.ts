import { NextResponse, type NextRequest } from "next/server";

/**
 * Gives every page a content security policy with a fresh nonce. The request copy tells Next which nonce to put on its own
 * scripts; the response copy binds the browser. Styles stay inline-able: radix-ui and sonner set style attributes and elements.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = btoa(crypto.randomUUID());
  const policy = contentSecurityPolicy(nonce, process.env.NODE_ENV === "development");
  const headers = new Headers(request.headers);
  headers.set("x-nonce", nonce);
  headers.set("content-security-policy", policy);
  // Pages can't see their own address; sign-in uses it to lead back to where somebody wanted to go.
  headers.set("x-pathname", request.nextUrl.pathname + request.nextUrl.search);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set("content-security-policy", policy);
  return response;
}

function contentSecurityPolicy(nonce: string, development: boolean): string {
  return [
    "default-src 'self'",
    // React's development build rebuilds server stacks with eval; the production build does not.
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    `connect-src 'self'${development ? " ws:" : ""}`,
    "object-src 'none'",
    "base-uri 'self'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");
}

// The API stays out: a proxied body is buffered and cut at 10 MB, and an upload may be larger.
export const config = {
  matcher: [
    {
      source: "/((?!api/|_next/static|_next/image|icon.svg|favicon.ico|images/).*)",
      missing: [{ type: "header", key: "next-router-prefetch" }],
    },
  ],
};
