import { defineConfig } from "vitest/config";

export default defineConfig({
  test: {
    include: [
      "solver/**/*.test.ts",
      "meshes/**/*.test.ts",
      "validation/**/*.test.ts",
      "api/**/*.test.ts",
      "viewer/**/*.test.{ts,tsx}",
    ],
    testTimeout: 120_000,
  },
});
