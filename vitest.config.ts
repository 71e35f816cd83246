import { configDefaults, defineConfig } from "vitest/config";

/** Tests that stand in for the file system need modules of their own; all others share theirs, which is far quicker. */
const ALONE = ["tests/publish/output-errors.test.ts"];

export default defineConfig({
  test: {
    testTimeout: 30_000,
    hookTimeout: 60_000,
    setupFiles: ["tests/setup.ts"],
    maxWorkers: 2,
    allowOnly: false,
    passWithNoTests: false,
    projects: [
      {
        extends: true,
        test: {
          name: "shared",
          include: ["tests/**/*.test.ts"],
          exclude: [...configDefaults.exclude, ...ALONE],
          isolate: false,
        },
      },
      { extends: true, test: { name: "alone", include: ALONE, isolate: true } },
    ],
  },
});
