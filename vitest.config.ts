import { defineConfig } from "vitest/config";

export default defineConfig({
  test: {
    include: ["test/**/*.test.ts"],
    testTimeout: 60_000,
    hookTimeout: 120_000,
    // a browser and two calculations at once are enough for two cores
    maxWorkers: 2,
  },
});
