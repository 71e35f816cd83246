import { beforeAll, describe, expect, test } from "vitest";
import { generatedFiles, staleFiles } from "../../schemas/generate-types.ts";

describe("the generated files", () => {
  let files: Map<string, string>;
  beforeAll(async () => {
    files = await generatedFiles();
  });

  test("match the schemas: otherwise run npm run generate", () => {
    expect(staleFiles(files)).toEqual([]);
  });

  test("come out the same, byte for byte, when generated again", async () => {
    expect(await generatedFiles()).toEqual(files);
  });

  test("are named when one has changed, is missing or belongs to no schema", () => {
    const changed = new Map(files);
    changed.set("pipeline/records/generated/flags.ts", "changed");
    changed.set("pipeline/records/generated/no-such-file.ts", "missing");
    changed.delete("pipeline/records/generated/grid.ts");
    expect(staleFiles(changed)).toEqual([
      "pipeline/records/generated/flags.ts",
      "pipeline/records/generated/no-such-file.ts",
      "pipeline/records/generated/grid.ts",
    ]);
  });

  test("need no package to validate, so that the compiled command loads them anywhere", () => {
    expect(files.get("pipeline/records/validators.js")).not.toMatch(/\b(import|require)\b/);
  });
});
