import { defineConfig } from "vitest/config";

/** Browser tests run against the built program; two cores bear one browser at a time best. */
export default defineConfig({
  root: `${import.meta.dirname}/../..`,
  test: {
    include: ["test/e2e/**/*.test.ts"],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    fileParallelism: false,
  },
});
