import { defineConfig } from "vitest/config";

export default defineConfig({
  root: new URL("..", import.meta.url).pathname,
  test: {
    globalSetup: ["test/setup/global.ts"],
    include: ["test/**/*.test.{ts,tsx}"],
    testTimeout: 60_000,
    hookTimeout: 180_000,
    maxWorkers: 2,
  },
});
