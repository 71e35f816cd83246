import fc from "fast-check";
import { beforeAll, describe, expect, test } from "vitest";
import { check } from "../../pipeline/commands/check.ts";
import type { Edition } from "../../pipeline/records/edition.ts";
import type { CheckResult } from "../../pipeline/records/generated/check-result.ts";
import { RowState } from "../../pipeline/records/measurements.ts";
import { editionOf, flagsOf, inFolder } from "../commands/curated.ts";

const CODES = ["range-below-curve", "range-above-curve", "ranges-disagree"];

const card = (source: string) =>
  JSON.stringify({
    ...{ format: 1, source, file: `${source}.csv` },
    columns: {
      ...{ solute: { column: "Compound" }, solvent: { column: "Solvent" } },
      temperature: { column: "T", unit: "°C" },
      solubility: { column: "S", unit_column: "Unit" },
      excess_solid: { column: "Excess" },
    },
  });

/** Invented solubilities of benzoic acid on a van 't Hoff line, g/kg, with a little scatter: 3.5 at 25 °C. */
const CURVE = ["10,2.09", "18,2.79", "25,3.47", "32,4.45", "40,5.90", "50,8.24"];
const seriesIn = (solvent: string) => CURVE.map((line) => `benzoic acid,${solvent},${line},g/kg solvent,`);

/** Lines of one source: `T,S,unit,excess solid` of benzoic acid in a solvent. */
const linesIn = (solvent: string, lines: readonly string[]) => lines.map((line) => `benzoic acid,${solvent},${line}`);

const table = (lines: readonly string[]) => `Compound,Solvent,T,S,Unit,Excess\n${lines.join("\n")}\n`;

/** The edition of sources by name. */
const editionWith = (sources: Readonly<Record<string, readonly string[]>>, settings: object = {}) =>
  editionOf({
    "collection.json": JSON.stringify({ format: 1, name: "test", settings }),
    ...Object.fromEntries(
      Object.entries(sources).flatMap(([name, lines]) => [
        [`sources/${name}.source.json`, card(name)],
        [`sources/${name}.csv`, table(lines)],
      ]),
    ),
  });

const rangeFlags = (edition: Edition) => flagsOf(edition, ...CODES);

describe("a value known only as a range", () => {
  const agreeing = [
    "25,<5,g/kg solvent,",
    "25,≤3.4,g/kg solvent,",
    "25,>2,g/kg solvent,",
    "25,at least 3,g/kg solvent,",
    "25,3-4,g/kg solvent,",
    "25,3 to 4,g/kg solvent,",
    "25,3.2,g/kg solvent,no",
    "25,300,mL solvent/g,no",
    "25,200-400,mL solvent/g,",
    "25,<8,-ln x,",
    "25,7.7,-ln x,no",
    "25,slightly soluble,,",
    // 42 °C: 155 mL of water per gram, a factor 1.55 outside 30 to 100.
    "42,sparingly soluble,,",
    // Outside the range of the curve nothing is known, and nothing is extrapolated.
    "70,<0.001,g/kg solvent,",
    "54,<0.001,g/kg solvent,",
  ];
  const contradicted: readonly (readonly [line: string, code: string, words: string])[] = [
    ["25,<0.5,g/kg solvent,", "range-below-curve", "<0.5 g/kg solvent"],
    ["25,0.1 to 0.3,g/kg solvent,", "range-below-curve", "0.1 to 0.3 g/kg solvent"],
    ["25,0.1-0.3,g/kg solvent,", "range-below-curve", "0.1-0.3 g/kg solvent"],
    ["25,insoluble,,", "range-below-curve", '"insoluble" (from 10000 mL solvent/g)'],
    ['25,"practically insoluble, or insoluble",,', "range-below-curve", '"practically insoluble, or insoluble"'],
    ["25,very slightly soluble,,", "range-below-curve", '"very slightly soluble" (1000 to 10000 mL solvent/g)'],
    ["25,≥5,g/kg solvent,", "range-above-curve", "≥5 g/kg solvent"],
    ["25,more than 5,g/kg solvent,", "range-above-curve", "more than 5 g/kg solvent"],
    ["25,5,g/kg solvent,no", "range-above-curve", "everything dissolved at 5 g/kg solvent"],
    ["25,100,mL solvent/g,no", "range-above-curve", "everything dissolved at 100 mL solvent/g"],
    ["25,1000 to 2000,mL solvent/g,", "range-below-curve", "1000 to 2000 mL solvent/g"],
    ["25,sparingly soluble,,", "range-above-curve", '"sparingly soluble" (30 to 100 mL solvent/g)'],
    ["25,soluble,,", "range-above-curve", '"soluble" (10 to 30 mL solvent/g)'],
    ["25,freely soluble,,", "range-above-curve", '"freely soluble" (1 to 10 mL solvent/g)'],
    ["25,very soluble,,", "range-above-curve", '"very soluble" (up to 1 mL solvent/g)'],
  ];
  let apart: Edition;

  beforeAll(async () => {
    const lines = [...agreeing, ...contradicted.map(([line]) => line)];
    // A curve, and every range in a source of its own.
    const each = lines.map((line, i) => [`r${i}`, linesIn("water", [line])] as const);
    apart = await editionWith({ bench: seriesIn("water"), ...Object.fromEntries(each) });
  });

  test("says nothing where it agrees with the curve or no curve reaches it, and gets a notice where it does not", () => {
    const flags = rangeFlags(apart);
    const wanted = contradicted.map(([, code], i) => `${code}@r${agreeing.length + i}:2`);
    expect(flags.map(({ id }) => id).sort()).toEqual(wanted.sort());
    contradicted.forEach(([, , words], i) => {
      const flag = flags.find(({ id }) => id.endsWith(`@r${agreeing.length + i}:2`));
      expect(flag).toMatchObject({ scope: "measurement", severity: "notice" });
      expect(flag?.evidence).toContain(words);
      expect(flag?.evidence).toMatch(/at 25\.0 °C: the curve gives [\d.]+ (g\/kg solvent|mL solvent\/g|-ln x) \(95 %/);
    });
    const states = Array.from(apart.table.state.subarray(0, apart.table.count));
    expect(states.filter((state) => state === RowState.interval)).toHaveLength(agreeing.length + contradicted.length);
  });

  test("is never fitted: the curve is the same to the last digit with and without it", async () => {
    const without = await editionWith({ bench: seriesIn("water") });
    const coefficients = (edition: Edition) => edition.fits.flatMap(({ curves }) => curves[0]?.coefficients ?? []);
    expect(coefficients(without).length).toBeGreaterThan(1);
    expect(coefficients(apart)).toEqual(coefficients(without));
  });

  test("that is a term follows the factor in the settings", async () => {
    // 2.8 times outside its range: told by default, as above, and from a factor of 3 no longer.
    const sources = { bench: seriesIn("water"), ranges: linesIn("water", ["25,sparingly soluble,,"]) };
    expect(rangeFlags(await editionWith(sources, { pharmacopoeia_factor: 3 }))).toEqual([]);
  });

  describe("in systems of several kinds", () => {
    let edition: Edition;
    const inSolvent = (solvent: string) => {
      const system = edition.systems.find(({ identity }) => identity.solvent === solvent)?.index;
      return rangeFlags(edition).filter((flag) => flag.system === system);
    };

    beforeAll(async () => {
      const point = (solvent: string) => linesIn(solvent, ["25,3.4,g/kg solvent,"]);
      const excluding = (from: number) => [
        "25,<5,g/kg solvent,",
        `${from},>100,g/kg solvent,`,
        "25,<900,g/kg solvent,",
      ];
      edition = await editionWith({
        bench: [
          ...seriesIn("water"),
          ...point("ethanol"),
          ...point("methanol"),
          ...linesIn("acetone", ["25,3.4,g/kg solvent,", "26,0.4,g/kg solvent,"]),
        ],
        // Lines 2 to 4, 5, 6, 7; then 8 to 10 and 11 to 13.
        ranges: [
          ...linesIn("water", ["20,<0.5,g/kg solvent,", "30,insoluble,,", "40,>50,g/kg solvent,"]),
          ...linesIn("ethanol", ["23,<0.5,g/kg solvent,"]),
          ...linesIn("methanol", ["20,<0.5,g/kg solvent,"]),
          ...linesIn("acetone", ["25,<0.5,g/kg solvent,"]),
          ...linesIn("toluene", excluding(24)),
          ...linesIn("heptane", excluding(15)),
        ],
        wrong: linesIn("1-propanol", [
          "25,<0,g/kg solvent,",
          "25,miscible,,",
          "25,0-0,g/kg solvent,",
          "25,<5,g/kg solvent,",
        ]),
      });
    });

    test("is one notice of its block where several of one source are contradicted alike", () => {
      const flags = inSolvent("water");
      expect(flags.map(({ code, scope }) => [code, scope])).toEqual([
        ["range-below-curve", "block"],
        ["range-above-curve", "measurement"],
      ]);
      expect(flags[0]?.evidence).toMatch(
        /^2 ranges \(lines 2, 3\) are contradicted alike; the furthest, line 3: "insoluble"/,
      );
    });

    test("is held against a point within 3 K where there is no curve, and against none further away", () => {
      const [near] = inSolvent("ethanol");
      expect(near).toMatchObject({ code: "range-below-curve", scope: "measurement" });
      expect(near?.evidence).toMatch(/line 8 of bench at 25\.0 °C gives 3\.4 g\/kg solvent/);
      expect(inSolvent("methanol")).toEqual([]);
    });

    test("is not held against one point where another agrees with it", () => {
      expect(inSolvent("acetone")).toEqual([]);
    });

    test("is told where another range excludes it and nothing else is known", () => {
      const [flag, ...more] = inSolvent("toluene");
      expect(more).toEqual([]);
      expect(flag).toMatchObject({ code: "ranges-disagree", scope: "system", severity: "notice" });
      expect(flag?.evidence).toMatch(
        />100 g\/kg solvent at 24\.0 °C \(line 9 of ranges\) and <5 .* exclude one another by a factor 1\d\.\d in mole fraction/,
      );
      expect(inSolvent("heptane")).toEqual([]);
    });

    test("that says less than nothing is refused, and so is a word that names no solubility", () => {
      expect(edition.refused.map(({ code, place }) => [place.source, place.line, code])).toEqual([
        ["wrong", 2, "value-not-positive"],
        ["wrong", 3, "not-a-number"],
        ["wrong", 4, "value-not-positive"],
      ]);
      expect(edition.refused[1]?.mend).toContain("as a lower bound");
    });
  });

  test("that holds the curve's value is never flagged, one beyond three times it always", async () => {
    const cases = fc.record({
      celsius: fc.integer({ min: 12, max: 48 }),
      factor: fc.double({ min: 1.01, max: 30, noNaN: true }),
    });
    const samples = fc.sample(cases, { numRuns: 200, seed: 20261201 });
    const value = (celsius: number) => 3.5 * Math.exp(3130 * (1 / 298.15 - 1 / (celsius + 273.15)));
    const line = (x: number, sign: string, celsius: number) => `${celsius},${sign}${x.toPrecision(4)},g/kg solvent,`;
    const right = samples.flatMap(({ celsius, factor }) => [
      line(value(celsius) * factor * 1.02, "<", celsius),
      line(value(celsius) / factor / 1.02, ">", celsius),
    ]);
    const tooLow = samples.map(({ celsius, factor }) => line(value(celsius) / (3 * factor), "<", celsius));
    const tooHigh = samples.map(({ celsius, factor }) => line(value(celsius) * 3 * factor, ">", celsius));
    const edition = await editionWith({
      bench: ["water", "ethanol", "acetone"].flatMap(seriesIn),
      right: linesIn("water", right),
      low: linesIn("ethanol", tooLow),
      high: linesIn("acetone", tooHigh),
    });
    const flags = rangeFlags(edition);
    expect(flags.map(({ id }) => id.replace(/@benzoic.*/, "")).sort()).toEqual([
      "range-above-curve@high",
      "range-below-curve@low",
    ]);
    for (const { evidence } of flags) {
      expect(evidence).toMatch(/^200 ranges \(lines 2, 3, 4, 5, 6, 7, 8, 9, 10, 11 and more\)/);
    }
  });
});

describe("a new value known only as a range", () => {
  const verdicts = (lines: readonly string[]): Promise<CheckResult> =>
    inFolder(
      {
        "c/collection.json": JSON.stringify({ format: 1, name: "test" }),
        "c/sources/bench.source.json": card("bench"),
        "c/sources/bench.csv": table([...seriesIn("water"), "benzoic acid,ethanol,25,>200,g/kg solvent,"]),
        "new.source.json": card("new"),
        "new.csv": table(lines),
      },
      async (folder) => {
        const printed: string[] = [];
        const terminal = { print: (text: string) => void printed.push(text), tell: () => {}, progress: () => {} };
        const options = { collection: `${folder}/c`, version: "test", json: true };
        await check(`${folder}/new.csv`, options as never, terminal as never);
        return JSON.parse(printed.join("")) as CheckResult;
      },
    );

  test("fits, is off the curve, or cannot be judged, with its reason", async () => {
    const { rows } = await verdicts([
      ...linesIn("water", [
        "25,<5,g/kg solvent,",
        "25,≤3.4,g/kg solvent,",
        "25,<0.5,g/kg solvent,",
        "25,freely soluble,,",
      ]),
      ...linesIn("water", ["25,5,g/kg solvent,no", "70,<5,g/kg solvent,"]),
      "benzoic acid,ethanol,25,>200,g/kg solvent,",
    ]);
    expect(rows.map(({ verdict }) => verdict)).toEqual([
      ...["fits", "fits", "off the curve", "off the curve", "off the curve", "outside the range", "cannot tell"],
    ]);
    const evidence = rows.map((row) => row.evidence);
    expect(evidence[0]).toBe("the curve lies within the range");
    expect(evidence[1]).toMatch(/^the curve lies a factor 1\.0\d above its upper limit, within what a new measurement/);
    expect(evidence[2]).toMatch(/^the curve lies a factor 7\.\d+ above its upper limit/);
    expect(evidence[3]).toMatch(/^the curve lies a factor 28(\.\d)? below its lower limit/);
    expect(rows[2]).toMatchObject({ expected_value: expect.closeTo(3.5, 1), look_at: expect.stringContaining("unit") });
  });
});
