import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

export default defineConfig({
  root: fileURLToPath(new URL("..", import.meta.url)),
  test: {
    include: ["tests/**/*.test.ts", "tests/**/*.test.tsx"],
    globalSetup: fileURLToPath(new URL("../build-resources/kernels.mjs", import.meta.url)),
    testTimeout: 180_000,
    hookTimeout: 60_000,
    pool: "forks",
    maxWorkers: 2,
    reporters: ["default", ["json", { outputFile: "test-results/vitest.json" }]],
  },
});
