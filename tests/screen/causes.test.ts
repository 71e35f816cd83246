import { describe, expect, test } from "vitest";
import type { Suspects } from "../../pipeline/screen/causes/cause.ts";
import { transpositions } from "../../pipeline/screen/causes/digits-transposed.ts";
import { EVERY_CAUSE } from "../../pipeline/screen/causes/every-cause.ts";

/** Three rows of one block in the order of its file. */
function suspects(rows: readonly number[], unit = "g/100 g solvent"): Suspects {
  const values = [12.3, 15, 18.4];
  return {
    rows,
    unit,
    method: "",
    soluteMolarMass: 180,
    otherCompositions: [{ system: 9, name: "solvent A + solvent B, 0.4", sameSource: true }],
    numberStandsIn: (_, system) => system === 4,
    temperatureK: (row) => 280 + 10 * row,
    reportedValue: (row) => values[row]!,
    neighbour: (row, step) => (row + step in values ? row + step : undefined),
    otherSolvents: [
      { system: 4, name: "solvent B", sameSource: true },
      { system: 7, name: "solvent C", sameSource: false },
    ],
  };
}

describe("every cause", () => {
  test("shares out at most a whole, for points and for blocks", () => {
    for (const cause of EVERY_CAUSE) {
      for (const unit of ["g/100 g solvent", "mg/mL solution", "mole fraction", "ln x", "mol/L solution", ""]) {
        for (const rows of [[1], [0, 1, 2]]) {
          const shares = cause.explanations(suspects(rows, unit)).map(({ weight }) => weight);
          expect(
            shares.every((share) => share > 0),
            cause.name,
          ).toBe(true);
          expect(
            shares.reduce((sum, share) => sum + share, 0),
            cause.name,
          ).toBeLessThanOrEqual(1 + 1e-12);
        }
      }
    }
  });

  test("has priors that leave room for an error without a known cause", () => {
    for (const level of ["pointPrior", "blockPrior"] as const) {
      expect(EVERY_CAUSE.reduce((sum, cause) => sum + cause[level], 0)).toBeLessThan(1.4);
    }
  });

  test("has a name of its own and says what to look at", () => {
    expect(new Set(EVERY_CAUSE.map(({ name }) => name)).size).toBe(EVERY_CAUSE.length);
    for (const { lookAt } of EVERY_CAUSE) expect(lookAt).toMatch(/^Look at .*\.$/);
  });
});

describe("swaps of neighbouring digits", () => {
  test("keep sign and decimal point", () => {
    expect(transpositions(12.34)).toEqual([21.34, 13.24, 12.43]);
    expect(transpositions(-1.2)).toEqual([-2.1]);
  });

  test("leave out what changes nothing", () => {
    expect(transpositions(11.1)).toEqual([]);
    expect(transpositions(5)).toEqual([]);
    expect(transpositions(1e-7)).toEqual([]);
  });
});

describe("the changes that undo a cause", () => {
  const changes = (name: string, of: Suspects, row: number) =>
    EVERY_CAUSE.find((cause) => cause.name === name)!
      .explanations(of)
      .map(({ change }) => change(row));

  test("read a value per solvent as the same number per solution first", () => {
    expect(changes("basis mix-up", suspects([0, 1, 2]), 1)[0]).toEqual({ kind: "unit", unit: "g/100 g solution" });
    expect(changes("basis mix-up", suspects([0, 1, 2], "mL solvent/g"), 1)).toEqual([]);
  });

  test("try a logarithm to the other base only where the unit is a logarithm", () => {
    expect(changes("logarithm base", suspects([1]), 1)).toEqual([]);
    expect(changes("logarithm base", suspects([1], "ln x"), 1)).toEqual([{ kind: "value", value: 15 * Math.LN10 }]);
  });

  test("take a single row to the temperature of its neighbours", () => {
    expect(changes("rows shifted", suspects([0]), 0)).toEqual([undefined, { kind: "temperature", temperatureK: 290 }]);
  });

  test("give a shifted block the numbers of the rows beside", () => {
    expect(changes("rows shifted", suspects([0, 1, 2]), 1)).toEqual([
      { kind: "value", value: 12.3 },
      { kind: "value", value: 18.4 },
    ]);
  });

  test("try no swap of digits on a whole block", () => {
    expect(changes("digits transposed", suspects([0, 1, 2]), 1)).toEqual([]);
  });
});
