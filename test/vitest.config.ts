import { defineConfig } from "vitest/config";

/** Tests mirror the sources; browser tests live in test/e2e and have their own run. */
export default defineConfig({
  root: `${import.meta.dirname}/..`,
  oxc: { jsx: { runtime: "automatic", importSource: "preact" } },
  test: {
    include: ["test/**/*.test.ts", "test/**/*.test.tsx"],
    exclude: ["test/e2e/**", "test/bench/**"],
    testTimeout: 20_000,
  },
});
