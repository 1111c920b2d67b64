import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

const root = fileURLToPath(new URL(".", import.meta.url));

// A zone far from UTC with an odd offset: a day that was computed in the machine's zone fails at once.
process.env.TZ = "Asia/Kathmandu";

const alias = {
  "@": root,
  // `server-only` throws outside the framework's own bundler; in tests there is no browser bundle to protect.
  "server-only": `${root}tests/support/empty.ts`,
};

export default defineConfig({
  resolve: { alias },
  test: {
    projects: [
      {
        resolve: { alias },
        test: {
          name: "unit",
          include: ["tests/unit/**/*.test.{ts,tsx}"],
          // Generous: a test here is never about time, and the machine may be busy.
          testTimeout: 30_000,
          setupFiles: ["tests/support/quiet-console.ts"],
        },
      },
      {
        resolve: { alias },
        test: {
          name: "database",
          include: ["tests/{database,routes}/**/*.test.{ts,tsx}"],
          pool: "forks",
          maxWorkers: 2,
          testTimeout: 30_000,
          hookTimeout: 60_000,
          globalSetup: ["tests/support/global-database.ts"],
          setupFiles: ["tests/support/quiet-console.ts", "tests/support/fresh-database.ts"],
        },
      },
    ],
  },
});
