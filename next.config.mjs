/** Headers that hold for every answer; the content policy of pages, with its nonce, is set in proxy.ts. */
const SECURITY_HEADERS = [
  { key: "X-Content-Type-Options", value: "nosniff" },
  { key: "Referrer-Policy", value: "strict-origin-when-cross-origin" },
  { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
  {
    key: "Permissions-Policy",
    value: "camera=(), microphone=(), geolocation=(), payment=(), usb=(), browsing-topics=()",
  },
];

/** @type {import("next").NextConfig} */
const config = {
  poweredByHeader: false,
  typedRoutes: true,
  // `npm run typecheck` checks both configurations; the build need not do half of it again.
  typescript: { ignoreBuildErrors: true },
  turbopack: { root: import.meta.dirname },
  serverExternalPackages: [
    "@libsql/client",
    "libsql",
    "drizzle-orm",
    "better-auth",
    "@better-auth/core",
    "@better-auth/drizzle-adapter",
    "piscina",
    "pino",
    "nodemailer",
    "mailparser",
    "smtp-server",
    "archiver",
  ],
  headers: async () => [
    { source: "/:path*", headers: SECURITY_HEADERS },
    {
      // An answer of the API is never a document: should one be opened as a page, nothing in it runs.
      source: "/api/:path*",
      headers: [{ key: "Content-Security-Policy", value: "default-src 'none'; frame-ancestors 'none'" }],
    },
  ],
};

export default config;
