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
    otherReadingK: (row) => (row === 1 ? 301 : undefined),
    cellIn: (_, system) => (system === 4 ? "the same number" : "nothing"),
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
      expect(EVERY_CAUSE.reduce((sum, cause) => sum + cause[level], 0)).toBeLessThan(2);
    }
  });

  test("has a name of its own and says what to look at", () => {
    expect(new Set(EVERY_CAUSE.map(({ name }) => name)).size).toBe(EVERY_CAUSE.length);
    for (const { lookAt } of EVERY_CAUSE) expect(lookAt).toMatch(/^Look at .*\.$/);
  });
});

describe("swaps of neighbouring digits", () => {
  test("keep sign and decimal point", () => {
    expect(transpositions(12.34)).toEqual([102.34, 21.34, 13.24, 12.43]);
    expect(transpositions(-0.12)).toEqual([-1.02, -0.21]);
  });

  test("bring back a zero that a swap carried to the front, where it is not written", () => {
    // 10.9 copied as 01.9.
    expect(transpositions(1.9)).toContain(10.9);
  });

  test("leave out what changes nothing, and the tenfold, which is a decimal point", () => {
    expect(transpositions(5)).toEqual([]);
    expect(transpositions(0.11)).toEqual([1.01]);
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

  test("take a column of ascending values beside mixed temperatures to have been sorted alone", () => {
    const temperatures = [320, 290, 310, 280, 300, 330];
    const values = [10, 12, 15, 18, 22, 27];
    const block = {
      ...suspects([0, 1, 2, 3, 4, 5]),
      temperatureK: (row: number) => temperatures[row]!,
      reportedValue: (row: number) => values[row]!,
    };
    expect(changes("rows shifted", block, 0)).toContainEqual({ kind: "temperature", temperatureK: 280 });
    expect(changes("rows shifted", block, 0)).toContainEqual({ kind: "temperature", temperatureK: 330 });
    const inOrder = { ...block, temperatureK: (row: number) => 280 + 10 * row };
    expect(changes("rows shifted", inOrder, 2)).not.toContainEqual({ kind: "temperature", temperatureK: 280 });
  });

  test("give a salt's mass the factor M/(M + 36.46) for a hydrochloride, and need a molar mass for it", () => {
    // Chlorine 35.45 and hydrogen 1.008, IUPAC 2021.
    expect(changes("salt or free base", suspects([0, 1, 2]), 1)[0]).toEqual({ kind: "factor", factor: 180 / 216.46 });
    expect(changes("salt or free base", { ...suspects([0]), soluteMolarMass: Number.NaN }, 0)).toEqual([]);
  });

  test("take a clear point to the temperature of the cloud point of the same solution", () => {
    expect(changes("cloud point for clear point", suspects([1]), 1)).toEqual([
      { kind: "temperature", temperatureK: 301 },
    ]);
    expect(changes("cloud point for clear point", suspects([0]), 0)).toEqual([undefined]);
  });

  test("hold it for likelier that a value was taken from a column in which the very number stands, by all its digits", () => {
    const ways = (value: number) =>
      EVERY_CAUSE.find(({ name }) => name === "value of another solvent")!.explanations({
        ...suspects([1]),
        reportedValue: () => value,
      });
    // Half a unit of the last digit is 1/30 of 15 and 1/302 of 15.1; 0.7 of copies stand as they were.
    expect(ways(15).map(({ exactly }) => exactly?.(1))).toEqual([0.7 * 15, undefined]);
    expect(ways(15.1)[0]!.exactly?.(1)).toBeCloseTo(0.7 * 151, 9);
    // No number is finer than 0.05 %, whatever its digits.
    expect(ways(15.123456)[0]!.exactly?.(1)).toBeCloseTo(0.7 / 5e-4, 9);
    expect(changes("composition mix-up", suspects([1]), 1)).toEqual([{ kind: "solvent", system: 9 }]);
  });

  test("try no swap of digits on a whole block", () => {
    expect(changes("digits transposed", suspects([0, 1, 2]), 1)).toEqual([]);
  });
});
