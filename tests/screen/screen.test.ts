import { describe, expect, test } from "vitest";
import { screen } from "../../pipeline/screen/screen.ts";
import { inputOf, type Reading, screened, series, thousandX } from "./support.ts";

const WARM = [10, 20, 30, 40, 50];
const good = () => series(WARM);
/** A second good source: its own temperatures, 2 % higher. */
const alsoGood = () => series([12, 22, 32, 42, 52], (value) => 1.02 * value);

describe("clean data", () => {
  test("raise no flag, whether one source, two or three", () => {
    expect(screened([{ a: good() }])).toEqual([]);
    expect(screened([{ a: good(), b: alsoGood() }])).toEqual([]);
    expect(screened([{ a: good(), b: alsoGood(), c: series([15, 25, 35, 45], (value) => 0.98 * value) }])).toEqual([]);
  });

  test("raise no flag where sources of one temperature agree", () => {
    expect(screened([{ a: [[25, 18.3]], b: [[25, 18.9]], c: [[25, 18]] }])).toEqual([]);
  });

  test("raise none in an edition without systems", () => {
    expect(screened([])).toEqual([]);
  });
});

describe("one point that is off", () => {
  test("with its decimal point one place to the left is found, named, and its value proposed", () => {
    const slip = series(WARM, (value, i) => (i === 2 ? value / 10 : value));
    const [flag, ...others] = screened([{ a: slip, b: alsoGood() }]);
    expect(others).toEqual([]);
    expect(flag).toMatchObject({
      scope: "measurement",
      code: "off-curve",
      severity: "blocking",
      row: 2,
      suspectedCause: "power of ten",
      causeDetail: "10 times too low",
    });
    expect(flag?.proposedValue).toBeCloseTo(good()[2]![1], 3);
    expect(flag?.causeProbability).toBeGreaterThan(0.9);
    expect(flag?.evidence).toMatch(
      /^a factor \d+(\.\d+)? below the curve of 2 sources, its own included \(z = -\d+\.\d\); expected 2\d\.\d 1000 x at 30\.0 °C, limits 2\d(\.\d)? to 2\d(\.\d)?$/,
    );
    expect(flag?.lookAt).toContain("decimal point");
  });

  test("with two digits swapped is named so", () => {
    // 13.45 at 10 °C written 31.45.
    const swapped: Reading[] = [[15, 31.45], ...series([20, 30, 40, 50])];
    const truth: Reading[] = [[15, 13.45], ...series([20, 30, 40, 50])];
    expect(Math.abs(Math.log(truth[0]![1] / thousandX(15)))).toBeLessThan(0.05);
    const [flag] = screened([{ a: swapped, b: alsoGood() }]);
    expect(flag).toMatchObject({ suspectedCause: "digits transposed", causeDetail: "31.45 should read 13.45" });
  });

  test("with its value swapped with that of the row behind is named so, both rows", () => {
    const values = good();
    const swapped: Reading[] = [values[0]!, [20, values[3]![1]], values[2]!, [40, values[1]![1]], values[4]!];
    const neighbours: Reading[] = [values[0]!, [20, values[2]![1]], [30, values[1]![1]], values[3]!, values[4]!];
    const flags = screened([{ a: neighbours, b: alsoGood() }]);
    expect(flags.map(({ row, suspectedCause }) => [row, suspectedCause])).toEqual([
      [1, "rows shifted"],
      [2, "rows shifted"],
    ]);
    // Rows that are not neighbours are not a shift.
    for (const flag of screened([{ a: swapped, b: alsoGood() }])) expect(flag.suspectedCause).not.toBe("rows shifted");
  });

  test("by a factor that no cause explains has no simple cause", () => {
    // 8.88 for about 21: no digits to swap, no usual dilution.
    const odd = series(WARM, (value, i) => (i === 2 ? 8.88 : value));
    const flags = screened([{ a: odd, b: alsoGood() }]);
    expect(flags).toMatchObject([{ row: 2, suspectedCause: "no simple cause" }]);
    expect(flags[0]).not.toHaveProperty("proposedValue");
    expect(flags[0]).not.toHaveProperty("causeDetail");
  });

  test("is found in a single source of enough points", () => {
    const slip = series([5, 10, 15, 20, 25, 30, 35, 40], (value, i) => (i === 3 ? 2 * value : value));
    expect(screened([{ a: slip }])).toMatchObject([{ code: "off-curve", row: 3 }]);
  });

  test("by less than the material threshold is left alone, however exact the data", () => {
    const exact = (change: (value: number, i: number) => number): Reading[] =>
      WARM.map((t, i) => [t, change(thousandX(t), i)]);
    const slightly = exact((value, i) => (i === 2 ? 1.07 * value : value));
    expect(
      screened([{ a: slightly, b: exact((value) => value * 1.001), c: exact((value) => value) }]).filter(
        ({ code }) => code === "off-curve",
      ),
    ).toEqual([]);
  });

  test("at an impossible temperature is flagged for its temperature", () => {
    const frozen: Reading[] = [...good(), [-233, 20]];
    expect(screened([{ a: frozen, b: alsoGood() }])).toMatchObject([
      { code: "off-curve", row: 5, evidence: "no solubility is measured at -233.0 °C" },
    ]);
  });
});

describe("few points", () => {
  test("cannot tell which is wrong, and say so once", () => {
    const flags = screened([
      {
        a: [
          [10, 11.6],
          [30, 35],
          [50, 41],
        ],
      },
    ]);
    for (const flag of flags) expect(flag.severity).toBe("notice");
    for (const flag of flags) expect(flag.code).toBe("cannot-tell");
  });

  test("stay silent where nothing looks off", () => {
    expect(screened([{ a: series([10, 30]) }])).toEqual([]);
    expect(screened([{ a: series([25]) }])).toEqual([]);
  });
});

describe("a whole block that is off", () => {
  test("is one finding: ten points of one bad source do not outvote two good ones of five", () => {
    const ten = [6, 11, 16, 21, 26, 31, 36, 41, 46, 51];
    const flags = screened([{ a: good(), b: alsoGood(), bad: series(ten, (value) => 1.5 * value) }]);
    expect(flags).toMatchObject([{ scope: "block", code: "block-off-curve", source: 2, severity: "blocking" }]);
    expect(flags[0]?.evidence).toMatch(
      /^the 10 points of bad from 6\.0 °C to 51\.0 °C lie, in the middle, \d\d % above the curve of 2 other sources that agree/,
    );
  });

  test("by a power of ten is named so", () => {
    const flags = screened([{ a: good(), b: alsoGood(), bad: series(WARM, (value) => 10 * value) }]);
    expect(flags).toMatchObject([{ scope: "block", suspectedCause: "power of ten", causeDetail: "10 times too high" }]);
  });

  test("in another basis, which bends the curve, is named so", () => {
    // g/kg solution written as 1000 x: x = 0.02 is w = 0.058.
    const mass = (value: number) => {
      const r = ((value / (1000 - value)) * 150) / 50;
      return Number(((1000 * r) / (1 + r)).toPrecision(4));
    };
    const flags = screened([{ a: good(), b: alsoGood(), bad: series(WARM, mass) }]);
    expect(flags).toMatchObject([
      { scope: "block", suspectedCause: "basis mix-up", causeDetail: "10^3 x should read g/kg solution" },
    ]);
  });

  test("with its temperatures in °F is named so", () => {
    const fahrenheit = good().map(([t, value]): Reading => [1.8 * t + 32, value]);
    const flags = screened([{ a: good(), b: alsoGood(), bad: fahrenheit }]);
    expect(flags).toMatchObject([
      { scope: "block", suspectedCause: "temperature unit", causeDetail: "temperature is in °F" },
    ]);
  });

  test("and coherently lower is not explained away: it could be the more stable form", () => {
    const flags = screened([{ a: good(), b: alsoGood(), lower: series(WARM, (value) => 0.7 * value) }]);
    expect(flags).toMatchObject([
      { scope: "block", code: "possible-more-stable-form", severity: "blocking", suspectedCause: "no simple cause" },
    ]);
    expect(flags[0]?.lookAt).toContain("more stable form");
  });

  test("is no block where only some of its points are off", () => {
    const half = series([9, 19, 29, 39, 49], (value, i) => (i === 1 ? value / 10 : i === 3 ? value / 2 : value));
    const flags = screened([{ a: good(), b: alsoGood(), half }]);
    expect(flags.map(({ scope }) => scope)).toEqual(["measurement", "measurement"]);
  });
});

describe("two sources that disagree", () => {
  test("give one flag on the system, with both readings, and nothing is set aside", () => {
    const input = inputOf([{ a: good(), b: series(WARM, (value) => 1.6 * value) }]);
    expect(input.fits[0]?.agreement).toBe("conflict");
    expect([...(input.fits[0]?.kept ?? [])]).toEqual(Array(10).fill(1));
    const flags = screen(input);
    expect(flags).toMatchObject([{ scope: "system", code: "sources-disagree", severity: "blocking", system: 0 }]);
    expect(flags[0]?.evidence).toMatch(
      /^no majority among the sources: at 30\.0 °C a \(5 points\) reads 2\d\.\d 1000 x \(x = 0\.02\d+, 6\.\d+ g\/100 g solvent\); b \(5 points\) reads 3\d(\.\d)? 1000 x \(x = 0\.03\d+, 1\d(\.\d)? g\/100 g solvent\), \d\d % above the first$/,
    );
    expect(flags[0]).not.toHaveProperty("suspectedCause");
  });
});

describe("a lack of fit", () => {
  test("shared by every source near a transition flags no point", () => {
    const bent = (t: number) => (t <= 32 ? thousandX(t) : thousandX(32));
    const steps = [0, 4, 8, 12, 16, 20, 24, 28, 34, 38, 42, 46, 50];
    const a: Reading[] = steps.map((t, i) => [t, bent(t) * (1 + 0.008 * ((i % 3) - 1))]);
    const b: Reading[] = steps.map((t, i) => [t + 1, bent(t + 1) * (1.02 + 0.008 * ((i % 2) - 0.5))]);
    expect(screened([{ a, b }])).toEqual([]);
  });
});

describe("notices", () => {
  test("tell that a reading stands twice, on the second row", () => {
    const twice: Reading[] = [...good(), good()[1]!];
    expect(screened([{ a: twice }])).toMatchObject([
      {
        code: "exact-repeat",
        severity: "notice",
        row: 5,
        evidence: "the same value at the same temperature stands in line 3 of this source: it counts once",
      },
    ]);
  });

  test("tell that a source repeats another's values, on the later one", () => {
    expect(screened([{ a: good(), b: good() }])).toMatchObject([
      { scope: "block", code: "re-reported", severity: "notice", source: 1 },
    ]);
    expect(screened([{ a: good(), b: [...good().slice(0, 2), ...alsoGood()] }])).toEqual([]);
  });

  test("tell of temperatures above the boiling point of the solvent", () => {
    const flags = screened([{ a: good() }], { boilingPointK: 318, freezingPointK: 200 });
    expect(flags).toMatchObject([
      {
        scope: "measurement",
        code: "outside-liquid-range",
        severity: "notice",
        row: 4,
        evidence: "1 point of a at 50.0 °C: above the normal boiling point of the solvent, 44.9 °C",
      },
    ]);
  });
});
