import { NextRequest } from "next/server";
import { describe, expect, it } from "vitest";
import { config, proxy } from "@/proxy";

const policyOf = (address: string): string => proxy(new NextRequest(address)).headers.get("content-security-policy") ?? "";

describe("the content security policy", () => {
  it("allows scripts by a nonce that is new with every answer, and no inline or foreign scripts", () => {
    const [first, second] = [policyOf("http://127.0.0.1:3000/cases"), policyOf("http://127.0.0.1:3000/cases")];
    const nonces = [first, second].map((policy) => /script-src 'self' 'nonce-([A-Za-z0-9+/=]{24,})' 'strict-dynamic'(;|$)/.exec(policy)?.[1]);
    expect(nonces.every((nonce) => nonce !== undefined)).toBe(true);
    expect(nonces[0]).not.toBe(nonces[1]);
  });

  it.each(["default-src 'self'", "object-src 'none'", "base-uri 'self'", "form-action 'self'", "frame-ancestors 'none'"])("contains %s", (part) => {
    expect(policyOf("http://127.0.0.1:3000/").split("; ")).toContain(part);
  });

  it("tells Next the same nonce on the request", () => {
    const response = proxy(new NextRequest("http://127.0.0.1:3000/"));
    const nonce = response.headers.get("x-middleware-request-x-nonce") ?? "none";
    expect(response.headers.get("content-security-policy")).toContain(`'nonce-${nonce}'`);
    expect(response.headers.get("x-middleware-request-content-security-policy")).toBe(response.headers.get("content-security-policy"));
  });
});

describe("the proxy's matcher", () => {
  const source = config.matcher[0]?.source ?? "";
  const matches = (path: string): boolean => new RegExp(`^${source}$`).test(path);

  it.each(["/", "/cases", "/cases/12", "/apiary"])("covers the page %s", (path) => expect(matches(path)).toBe(true));
  it.each(["/api/v1/cases", "/api/health", "/_next/static/chunks/a.js", "/icon.svg"])("leaves out %s, whose bodies must pass whole", (path) => expect(matches(path)).toBe(false));
});
