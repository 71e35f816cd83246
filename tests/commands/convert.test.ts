import { describe, expect, test } from "vitest";
import { type ConvertOptions, convert } from "../../pipeline/commands/convert.ts";
import { withUncertainty } from "../../pipeline/commands/convert-answer.ts";
import type { InputError } from "../../pipeline/problems/input-error.ts";
import type { ConvertResult } from "../../pipeline/records/generated/convert-result.ts";
import { documentErrors } from "../schemas/table-rows.ts";

/** Runs the command in this process: what it printed, told and ended with; the problem that stopped it, if one did. */
async function run(value: string, options: Partial<ConvertOptions> = {}) {
  const [printed, told]: [string[], string[]] = [[], []];
  const terminal = {
    print: (text: string) => void printed.push(text),
    tell: (text: string) => void told.push(text),
    progress: () => {},
    onInterrupt: () => {},
  };
  const all = { to: "mole fraction", solute: "paracetamol", solvent: "water", temperature: "25 °C", ...options };
  const ended = await convert(value, all, terminal).catch((error: InputError) => error.problem);
  const [code, problem] = typeof ended === "number" ? [ended, undefined] : [2, ended];
  return { code, problem, stdout: printed.join("\n"), stderr: told.join("\n") };
}

async function json(value: string, options: Partial<ConvertOptions> = {}) {
  const { code, problem, stdout } = await run(value, { ...options, json: true });
  if (problem !== undefined) throw new Error(problem.found);
  const result = JSON.parse(stdout) as ConvertResult;
  expect(documentErrors("convert-result", result)).toEqual([]);
  return { code, result };
}

const copper = { solute: "copper(II) sulfate", solidForm: "pentahydrate", temperature: "20 °C" };

describe("one conversion", () => {
  test("tells value and uncertainty, each step with its equation, each property with its reference, budget and assumptions", async () => {
    const { code, stdout } = await run("12.3 mg/mL solution", { uncertainty: "0.3" });
    expect(code).toBe(0);
    expect(stdout.split("\n")[0]).toBe(
      "12.3 mg/mL solution = 0.001483 ± 0.000037 mole fraction  (standard uncertainty 2.5 %)",
    );
    for (const line of [
      /^ {2}1\/rho = w\/rho2 \+ \(1 - w\)\/rho1 at w = r\/\(1 \+ r\) +rho = 999\.\d+ kg\/m3$/m,
      /^ {2}r = c\/\(rho - c\) +r = 0\.0124\d+ kg\/kg$/m,
      /^ {2}x = \(r\/M2\)\/\(r\/M2 \+ 1\/M1\) +x = 0\.00148\d+ mol\/mol$/m,
      /^ {2}M2 +151\.16\d+ ± 0\.00\d+ g\/mol +molar mass of the solute +IUPAC 2021/m,
      /^ {2}rho1 +997\.047\d* ± .* density of the solvent +Tanaka/m,
      /^ {2}2\.5 % +reported value$/m,
      /^ {2}at most .* % each: .*density of the solvent/m,
      /^ {2}volume of solution taken at the measuring temperature$/m,
    ]) {
      expect(stdout).toMatch(line);
    }
    expect(stdout.split("\n").length).toBeLessThan(25);
  });

  test("says the same as JSON, with a budget whose squares add up", async () => {
    const { code, result } = await json("12.3 mg/mL solution", { uncertainty: "0.3" });
    expect(code).toBe(0);
    const { value, standard_uncertainty: u, budget = [], steps, assumptions, cautions } = result;
    expect(value).toBeCloseTo(0.001483, 6);
    expect(Math.hypot(...budget.map(({ percent }) => percent))).toBeCloseTo((100 * (u ?? 0)) / (value ?? 0), 9);
    expect(budget[0]?.name).toBe("reported value");
    expect(steps.map(({ symbol }) => symbol)).toEqual(["c", "rho", "r", "x", "value"]);
    expect(assumptions.length).toBeGreaterThan(1);
    expect(cautions).toEqual([]);
    expect(result.readings).toBeUndefined();
  });

  test("without an uncertainty takes the value as exact and says so", async () => {
    const { result } = await json("1 g/100 g solvent");
    expect(result.assumptions).toContain("value taken as exact: only properties contribute to the uncertainty");
  });

  test("asks for a weighed value where a density error is amplified more than twice", async () => {
    const { code, stdout } = await run("900 g/L solution", { solute: "urea", temperature: "60 °C", to: "g/g solvent" });
    expect(code).toBe(0);
    expect(stdout).toMatch(/\ncaution\n {2}.*4\.4 times amplified: ask for a weighed value$/);
  });
});

describe("an uncertainty", () => {
  const of = async (uncertainty: string, more: Partial<ConvertOptions> = {}) => {
    const { result } = await json("20 g/100 g solvent", { to: "g/100 g solvent", uncertainty, ...more });
    return result.standard_uncertainty;
  };

  // GUM 4.2.3, 4.3.3 and 4.3.7.
  test.each([
    ["0.6", {}, 0.6],
    ["± 0.6", {}, 0.6],
    ["3 %", {}, 0.6],
    ["3%", {}, 0.6],
    ["1.2", { uncertaintyKind: "expanded" }, 0.6],
    ["1.8", { uncertaintyKind: "expanded", coverageFactor: "3" }, 0.6],
    ["6 %", { uncertaintyKind: "expanded" }, 0.6],
    ["0.6", { uncertaintyKind: "range" }, 0.6 / Math.sqrt(3)],
    ["1.2", { uncertaintyKind: "standard deviation", n: "4" }, 0.6],
    ["1.2", { uncertaintyKind: "standard deviation" }, 1.2],
  ])("of %s with %o is a standard one of %d g/100 g", async (uncertainty, more, expected) => {
    expect(await of(uncertainty, more)).toBeCloseTo(expected, 12);
  });

  test("of 5 % on a logarithm is 0.05 in ln x", async () => {
    const { result } = await json("-5 ln x", { to: "ln x", uncertainty: "5 %" });
    expect(result.standard_uncertainty).toBeCloseTo(0.05, 12);
  });

  test.each([
    ["-0.1", {}, "bad-uncertainty"],
    ["25", {}, "bad-uncertainty"],
    ["100 %", {}, "bad-uncertainty"],
    ["0.3 mg", {}, "bad-argument"],
    ["small", {}, "not-a-number"],
    ["0.3", { uncertaintyKind: "guessed" }, "bad-choice"],
    ["0.3", { uncertaintyKind: "expanded", coverageFactor: "0" }, "bad-uncertainty"],
  ])("of %s with %o is refused as %s", async (uncertainty, more, code) => {
    const { problem } = await run("20 g/100 g solvent", { uncertainty, ...more });
    expect(problem).toMatchObject({ code, place: { file: expect.stringMatching(/^saltern convert, --/) } });
    expect(problem?.mend).not.toBe("");
  });
});

describe("an open basis is converted in every reading, none is chosen, and the command ends with 1", () => {
  test("of the unit", async () => {
    const { code, stdout, stderr } = await run("31.6 g/100 g", { solute: "KNO3", temperature: "20 °C" });
    expect(code).toBe(1);
    expect(stdout).toMatch(
      /is open; it can be read as\n {2}g\/100 g solution {2}.*\n {2}g\/100 g solvent .*mole fraction$/,
    );
    expect(stderr).toMatch(/\[open-unit\]/);
    const { result } = await json("31.6 g/100 g", { solute: "KNO3", temperature: "20 °C" });
    expect(result).toMatchObject({ value: null, standard_uncertainty: null, steps: [] });
    // r = 0.462 and 0.316 g/g; M 101.102 and 18.015 g/mol.
    expect(result.readings?.map(({ reading }) => reading)).toEqual(["g/100 g solution", "g/100 g solvent"]);
    expect(result.readings?.[0]?.value).toBeCloseTo(0.0761, 4);
    expect(result.readings?.[1]?.value).toBeCloseTo(0.0533, 4);
  });

  test("of a hydrate", async () => {
    const { code, result } = await json("36.7 g/100 g solvent", {
      ...copper,
      to: "g/100 g solvent",
      uncertainty: "1 %",
    });
    expect(code).toBe(1);
    const values = result.readings?.map(({ reading, value }) => [reading, Number(value?.toPrecision(3))]);
    expect(values).toEqual([
      ["anhydrous", 36.7],
      ["hydrate per added solvent", 20.7],
      ["hydrate equivalent per total solvent", 23.5],
    ]);
    for (const { standard_uncertainty: u } of result.readings ?? []) expect(u).toBeGreaterThan(0.1);
  });

  test("of a bare volume from 20 g/L up", async () => {
    const { code, result } = await json("150 mg/mL", { solvent: "ethanol", to: "g/100 g solvent" });
    expect(code).toBe(1);
    expect(result.readings?.map(({ reading }) => reading)).toEqual(["mg/mL solution", "mg/mL solvent"]);
    expect((await json("15 mg/mL", { to: "g/100 g solvent" })).code).toBe(0);
  });

  test("of a unit and a hydrate at once", async () => {
    const { result } = await json("36.7 g/100 g", copper);
    expect(result.readings?.map(({ reading }) => reading)).toEqual([
      "g/100 g solution, anhydrous",
      "g/100 g solution, hydrate equivalent per total solvent",
      "g/100 g solvent, anhydrous",
      "g/100 g solvent, hydrate per added solvent",
      "g/100 g solvent, hydrate equivalent per total solvent",
    ]);
  });

  test("and a reading that nothing can have says so instead of a value", async () => {
    const { stdout } = await run("120 g/100 g", { solute: "urea" });
    expect(stdout).toMatch(/g\/100 g solution {2}cannot be converted: w = 1\.2 leaves no solvent/);
    const { result } = await json("120 g/100 g", { solute: "urea" });
    expect(result.readings?.[0]).toMatchObject({ value: null, standard_uncertainty: null });
  });
});

describe("the temperature of a volume", () => {
  test("is stated with --volume-temperature", async () => {
    const at = (volumeTemperature?: string) =>
      json("10 g/L solvent", {
        to: "g/100 g solvent",
        temperature: "60 °C",
        ...(volumeTemperature === undefined ? {} : { volumeTemperature }),
      });
    const [cold, hot] = [await at(), await at("60 °C")];
    // Water at 20 °C and at 60 °C: 998.21 and 983.19 kg/m3.
    expect((hot.result.value ?? 0) / (cold.result.value ?? 1)).toBeCloseTo(998.21 / 983.19, 4);
    expect(cold.result.assumptions).toContain("volume of solvent taken at 20 °C");
    expect(hot.result.assumptions).not.toContain("volume of solvent taken at 20 °C");
  });
});

describe("bad input is a named problem with its place and a remedy", () => {
  test.each([
    ["density slip", "15 g/L solution", { solutionDensity: "0.8" }, "implausible-density", "--solution-density"],
    ["density unit", "15 g/L solution", { solutionDensity: "1.1 lb" }, "unknown-density-unit", "--solution-density"],
    [
      "hydrate without its count",
      "15 g/100 g solvent",
      { solidForm: "channel hydrate", soluteBasis: "hydrate per added solvent" },
      "unknown-guest-count",
      "value",
    ],
    ["no density there", "15 g/L solution", { solvent: "ethanol", temperature: "400 °C" }, "no-density", "value"],
    ["unknown solvent", "15 g/L solution", { solvent: "moonshine" }, "unknown-solvent", "--solvent"],
    ["below 0 K", "15 g/L solution", { temperature: "-300 °C" }, "below-absolute-zero", "--temperature"],
    ["volume below 0 K", "15 g/L", { volumeTemperature: "-1 K" }, "below-absolute-zero", "--volume-temperature"],
  ])("%s", async (_, value, options, code, argument) => {
    const { problem } = await run(value, options);
    expect(problem).toMatchObject({ code, place: { file: `saltern convert, ${argument}` } });
    expect(problem?.mend.length).toBeGreaterThan(10);
    expect(problem?.found).not.toMatch(/NaN|undefined/);
  });

  test("a density with a unit is taken in it", async () => {
    const options = { to: "g/100 g solvent", solutionDensity: "1.05 g/mL" };
    const { result } = await json("100 g/L solution", options);
    expect(result.value).toBeCloseTo(10_000 / 950, 9);
  });
});

test.each([
  [0.00148317, 0.0000371, "0.001483 ± 0.000037"],
  [341.2, 87.3, "341 ± 87"],
  [1200, 108.2, "1200 ± 110"],
  [20.7, 0, "20.7"],
  [-6.5138, 0.0212, "-6.514 ± 0.021"],
  [3.21e-7, 0.4e-7, "(3.21 ± 0.40)e-7"],
  [0.0999, 0.00996, "0.100 ± 0.010"],
  [4.2, 95, "4 ± 95"],
])("%d with standard uncertainty %d is shown as %s", (value, u, shown) => {
  expect(withUncertainty(value, u)).toBe(shown);
});
