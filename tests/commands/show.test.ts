import { readdirSync, rmSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { beforeAll, describe, expect, onTestFinished, test } from "vitest";
import { findSystem } from "../../pipeline/commands/find-system.ts";
import { show } from "../../pipeline/commands/show.ts";
import { textPlot } from "../../pipeline/commands/text-plot.ts";
import { curate } from "../../pipeline/curate.ts";
import type { InputError } from "../../pipeline/problems/input-error.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { makeHostileCollection } from "../report/hostile-collection.ts";
import { copyOf, scratch } from "./saltern.ts";

const demo = fileURLToPath(new URL("../../datasets/demo/", import.meta.url));

/** The demo with four of its sources: what is shown of a system needs no others, and show curates all of them. */
const fewer = join(scratch(), "demo");
beforeAll(() => {
  copyOf("demo", fewer);
  const kept = ["harbour-2026-", "crystal-lab-2025-clear-points", "report-2019-mole-fractions"];
  for (const name of readdirSync(join(fewer, "sources"))) {
    if (!kept.some((source) => name.startsWith(source))) rmSync(join(fewer, "sources", name));
  }
  rmSync(join(fewer, "rulings.csv"));
});

/** Runs show and returns what it printed. */
async function shown(collection: string, system: string, json = false): Promise<string> {
  const lines: string[] = [];
  const silent = () => {};
  const code = await show(
    collection,
    system,
    { version: "test", json },
    { print: (text) => lines.push(text), tell: silent, progress: silent, onInterrupt: silent },
  );
  expect(code).toBe(0);
  return lines.join("\n");
}

describe("a system is found", () => {
  let systems: Awaited<ReturnType<typeof curate>>["edition"]["systems"];
  let index: Awaited<ReturnType<typeof curate>>["index"];
  beforeAll(async () => {
    const curated = await curate(await readCollection(demo), "test");
    systems = curated.edition.systems;
    index = curated.index;
  });
  const found = (text: string) => findSystem(systems, text, index);

  test("by its id, by a part that fits it alone, by solute in solvent in any case, and by a synonym of the tables", () => {
    const wanted = systems.find(({ id }) => id.startsWith("benzoic-acid-in-toluene"));
    expect(wanted).toBeDefined();
    for (const text of [
      wanted?.id ?? "",
      "benzoic-acid-in-tol",
      "Benzoic  Acid in TOLUENE",
      "benzenecarboxylic acid in methylbenzene",
    ]) {
      expect(found(text).system?.id, text).toBe(wanted?.id);
    }
  });

  test("never by a guess: several that fit are all told, a misspelt one is suggested", () => {
    const several = found("ibuprofen");
    expect(several.system).toBeUndefined();
    expect(several.system === undefined && several.fitting.length).toBe(
      systems.filter(({ identity }) => identity.solute === "ibuprofen").length,
    );
    const misspelt = found("caffein in ethyl acetat");
    expect(misspelt.system === undefined && misspelt.near.map(({ identity: i }) => i.solute)).toEqual(["caffeine"]);
    expect(found("")).toEqual({ fitting: [], near: [] });
    expect(found("zirconium in mercury")).toEqual({ fitting: [], near: [] });
  });
});

test("a system that is not there is refused with the ids that were close", async () => {
  const error = await shown(fewer, "caffein in ethyl acetat").catch((e: InputError) => e);
  expect((error as InputError).problem).toMatchObject({
    code: "bad-argument",
    mend: expect.stringMatching(/^did you mean caffeine-in-ethyl-acetate-/),
  });
});

test("the text tells who measured, the equation, values inside the range and every flag; the JSON tells the same", async () => {
  const text = await shown(fewer, "benzoic acid in toluene");
  const json = JSON.parse(await shown(fewer, "benzoic acid in toluene", true)) as {
    curves: { T_min_K: number; T_max_K: number; values: { temperature_K: number; g_per_100g_solvent: number }[] }[];
    sources: { letter: string; source: string; measurements: number; kept: number }[];
    flags: { flag_id: string }[];
  };
  expect(json.sources.map(({ letter }) => letter)).toEqual(["A", "B", "C"]);
  for (const { letter, source, measurements, kept } of json.sources) {
    expect(text).toContain(`${letter}  ${source}: ${measurements} measurements, ${kept} kept`);
  }
  const [curve] = json.curves;
  expect(text).toMatch(/ln x = a \+ b\/T/);
  for (const { temperature_K, g_per_100g_solvent } of curve?.values ?? []) {
    expect(temperature_K).toBeGreaterThanOrEqual(curve?.T_min_K ?? Number.NaN);
    expect(temperature_K).toBeLessThanOrEqual(curve?.T_max_K ?? Number.NaN);
    expect(text).toContain(String(Number(g_per_100g_solvent.toPrecision(4))));
  }
  expect(json.flags.length).toBeGreaterThan(0);
  for (const { flag_id } of json.flags) expect(text).toContain(flag_id);
});

test("no control or bidirectional character of the data reaches the terminal, and a long name is cut", async () => {
  const folder = makeHostileCollection();
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }));
  for (const part of ["bell", "left", "x".repeat(50)]) {
    const text = await shown(folder, part);
    expect(/\p{Bidi_Control}|(?!\n)\p{Cc}/u.exec(text)?.[0], part).toBeUndefined();
    expect(text).not.toMatch(/x{401}/);
  }
});

describe("a plot of characters", () => {
  const plot = (
    points: readonly { x: number; y: number; mark: string }[],
    curve: readonly { x: number; y: number }[] = [],
  ) => textPlot({ xLabel: "t", yLabel: "s", points, curve });

  test("puts the lowest point lower left, the highest upper right, and several sources in one place as a star", () => {
    const lines = plot([
      { x: 0, y: 1, mark: "A" },
      { x: 10, y: 2, mark: "A" },
      { x: 10, y: 2, mark: "B" },
    ]);
    expect(lines[0]).toBe("s");
    expect(lines[1]?.endsWith("*")).toBe(true);
    expect(lines[1]?.trimStart().startsWith("2 +")).toBe(true);
    expect(lines[16]?.trimStart().startsWith("1 +A")).toBe(true);
    expect(lines.join("").match(/A/g)).toHaveLength(1);
  });

  test("says so where its upright axis is logarithmic, and draws nothing of what is not finite or not positive", () => {
    expect(
      plot([
        { x: 0, y: 1, mark: "A" },
        { x: 1, y: 100, mark: "A" },
      ])[0],
    ).toBe("s (logarithmic)");
    expect(
      plot([
        { x: 0, y: Number.NaN, mark: "A" },
        { x: 1, y: 0, mark: "A" },
      ]),
    ).toEqual([]);
    expect(plot([{ x: 5, y: 3, mark: "A" }]).join("")).toContain("A");
  });
});

test("the text of a system whose solid changes says where, with limits, and names the branches", async () => {
  const handbook = fileURLToPath(new URL("../../datasets/handbook/", import.meta.url));
  const lines = (await shown(handbook, "sodium-sulfate-in-water")).split("\n");
  const at = lines.findIndex((line) =>
    /^the solid changes at 3\d\.\d °C \(95 % limits \d+\.\d to \d+\.\d °C\): two branches meet there$/.test(line),
  );
  expect(at).toBeGreaterThan(0);
  expect(lines[at + 1]).toMatch(/p = 0\.00\d \(parametric bootstrap\)/);
  expect(lines.filter((line) => /^curve of branch [12]: /.test(line))).toHaveLength(2);
});
