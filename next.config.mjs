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

/** Where an answer does not say itself how long it may be kept, a redirection above all, nobody keeps it. */
const keptByNobody = [{ key: "Cache-Control", value: "private, no-store" }];
const NOT_OF_ANYONE = "/((?!_next/static|_next/image|favicon.ico|icon.svg).*)";

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
  // Verbs stand in the log by their names, which shortening would take from them.
  experimental: { serverMinification: false },
  headers: () =>
    Promise.resolve([
      { source: "/:path*", headers: everyAnswer },
      { source: NOT_OF_ANYONE, headers: keptByNobody },
    ]),
};

export default withNextIntl(config);
