import type { NextConfig } from "next";

const config: NextConfig = {
  poweredByHeader: false,
  reactStrictMode: true,
  // Native or worker-starting packages are loaded from node_modules, not bundled.
  serverExternalPackages: ["piscina", "@libsql/client", "@node-rs/argon2"],
  turbopack: { root: import.meta.dirname },
  // Without it the reference page's bundle fails with "refract is not a function"; in development it makes other pages
  // fail with a stack overflow.
  experimental: { turbopackModuleFragments: process.env.NODE_ENV === "production" },
  headers: async () => [
    {
      source: "/:path*",
      headers: [
        { key: "X-Content-Type-Options", value: "nosniff" },
        { key: "Referrer-Policy", value: "same-origin" },
        { key: "X-Frame-Options", value: "DENY" },
        { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
        { key: "Permissions-Policy", value: "camera=(self), geolocation=(), microphone=()" },
      ],
    },
  ],
};

export default config;
