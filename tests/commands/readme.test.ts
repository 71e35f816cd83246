import { readFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { saltern, scratch } from "./saltern.ts";

const readme = readFileSync(new URL("../../README.md", import.meta.url), "utf8");

/** Lines of the block that follows a mark in the README. */
function shown(mark: string): string[] {
  const block = new RegExp(`<!-- ${mark} -->\\n\`\`\`\\n([^]*?)\`\`\``).exec(readme)?.[1];
  if (block === undefined) throw new Error(`README.md has no block marked ${mark}`);
  return block.trimEnd().split("\n");
}

/** Every line shown occurs in the real output, in this order; `...` stands for lines left out. */
function expectShown(mark: string, output: string): void {
  const real = output.split("\n").map((line) => line.trimEnd());
  let from = 0;
  for (const line of shown(mark).filter((text) => text.trim() !== "...")) {
    const at = real.indexOf(line.trimEnd(), from);
    expect(at, `README.md shows a line that is not printed (here): ${line}`).toBeGreaterThanOrEqual(0);
    from = at + 1;
  }
}

test("the output of the demo in the README is what the command prints", async () => {
  const out = join(scratch(), "demo-merge");
  const run = await saltern(["merge", "datasets/demo", "--out", out]);
  expectShown("demo output", run.stdout.replaceAll(out, "reports/demo-merge"));
});

test("the conversion in the README is what the command prints", async () => {
  const arguments_ = ["--to", "mole fraction", "--solute", "paracetamol", "--solvent", "ethanol"];
  const run = await saltern([
    "convert",
    "12.3 mg/mL solution",
    ...arguments_,
    "--temperature",
    "20 °C",
    "--uncertainty",
    "0.3",
  ]);
  expectShown("convert output", run.stdout);
});
