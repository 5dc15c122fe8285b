import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

const root = fileURLToPath(new URL("..", import.meta.url));

/** Three groups, because the guards start tools of their own and the browser wants the machine to itself. */
export default defineConfig({
  root,
  test: {
    root,
    maxWorkers: 2,
    projects: [
      {
        root,
        test: { name: "units", include: ["test/**/*.test.ts"], exclude: ["test/guards/**", "test/browser/**"], testTimeout: 30_000 },
      },
      { root, test: { name: "guards", include: ["test/guards/**/*.test.ts"], testTimeout: 120_000, hookTimeout: 120_000 } },
      {
        root,
        test: { name: "browser", include: ["test/browser/**/*.test.ts"], testTimeout: 120_000, hookTimeout: 120_000, fileParallelism: false },
      },
    ],
  },
});
