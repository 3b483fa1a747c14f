import { defineConfig } from "vitest/config";

export default defineConfig({
  test: {
    include: ["solver/**/*.test.ts", "meshes/**/*.test.ts", "validation/**/*.test.ts", "api/**/*.test.ts"],
    testTimeout: 120_000,
  },
});
