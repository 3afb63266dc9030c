import { defineConfig } from "vitest/config";

export default defineConfig({
  root: new URL("..", import.meta.url).pathname,
  test: {
    include: ["tests/**/*.test.ts", "tests/**/*.test.tsx"],
    testTimeout: 30_000,
    coverage: { provider: "v8", include: ["src/**/*.ts"], reporter: ["text-summary", "json-summary"] },
  },
});
