import createNextIntlPlugin from "next-intl/plugin";

const withNextIntl = createNextIntlPlugin("./lib/web/i18n.ts");

/** What every answer carries, pages and bytes alike. The content policy with its nonce is set by proxy.ts. */
const everyAnswer = [
  { key: "X-Content-Type-Options", value: "nosniff" },
  { key: "Referrer-Policy", value: "same-origin" },
  { key: "X-Frame-Options", value: "DENY" },
  { key: "Cross-Origin-Opener-Policy", value: "same-origin" },
  { key: "Cross-Origin-Resource-Policy", value: "same-origin" },
  { key: "Permissions-Policy", value: "camera=(self), geolocation=(), microphone=(), payment=(), usb=()" },
];

/** @type {import("next").NextConfig} */
const config = {
  poweredByHeader: false,
  reactStrictMode: true,
  // Types are checked by npm run check and npm test; a start does not wait for them a second time.
  typescript: { ignoreBuildErrors: true },
  typedRoutes: true,
  // The optimiser decodes whatever it is given; our pictures are re-encoded by the worker instead.
  images: { unoptimized: true },
  // Sequelize asks for drivers it does not use when it is bundled; the others load files beside themselves.
  serverExternalPackages: ["sequelize", "formidable", "graphile-worker", "@node-rs/argon2", "sharp", "pino"],
  headers: () => Promise.resolve([{ source: "/:path*", headers: everyAnswer }]),
};

export default withNextIntl(config);
