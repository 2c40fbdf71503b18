import { fileURLToPath } from "node:url";

const securityHeaders = [
  { key: "X-Content-Type-Options", value: "nosniff" },
  { key: "X-Frame-Options", value: "DENY" },
  // Invitation and reset links carry a token in their address: never pass it to another site.
  { key: "Referrer-Policy", value: "same-origin" },
  { key: "Permissions-Policy", value: "camera=(), microphone=(), geolocation=()" },
];

/** @type {import("next").NextConfig} */
const config = {
  reactStrictMode: true,
  poweredByHeader: false,
  devIndicators: false,
  // The type check belongs to npm test: a mistake in a test file must not keep an installation from starting.
  typescript: { ignoreBuildErrors: true },
  turbopack: { root: fileURLToPath(new URL(".", import.meta.url)) },
  experimental: { optimizePackageImports: ["radix-ui"] },
  serverExternalPackages: ["pg", "pg-boss", "nodemailer", "smtp-server"],
  async headers() {
    return [{ source: "/:path*", headers: securityHeaders }];
  },
};

export default config;
