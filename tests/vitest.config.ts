import { defineConfig } from "vitest/config";

export default defineConfig({
  root: new URL("..", import.meta.url).pathname,
  test: {
    coverage: { provider: "v8", include: ["src/**/*.ts"], reporter: ["text-summary", "json-summary"] },
    projects: [
      {
        extends: true,
        test: {
          name: "fast",
          include: ["tests/**/*.test.ts", "tests/**/*.test.tsx"],
          exclude: ["tests/browser/**"],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        // After the others, a file at a time: the page under test then has the machine to itself.
        test: {
          name: "browser",
          include: ["tests/browser/**/*.test.ts"],
          globalSetup: ["tests/browser/global-setup.ts"],
          fileParallelism: false,
          sequence: { groupOrder: 1 },
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
});
