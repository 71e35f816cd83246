import { describe, expect, test } from "vitest";
import { relativeRounding } from "../../pipeline/numerics/decimal-rounding.ts";
import { codeOf, createMeasurementTable } from "../../pipeline/records/measurements.ts";
import { screen } from "../../pipeline/screen/screen.ts";
import { thresholdKind } from "../../pipeline/screen/threshold-kind.ts";
import { inputOf, type Reading, screened, series, thousandX } from "./support.ts";

const WARM = [10, 20, 30, 40, 50];
const RANGE = [5, 12, 19, 26, 33, 40, 47, 54];

describe("calculated values", () => {
  const calculated = RANGE.map((t): Reading => [t, thousandX(t)]);

  test("that lie on a curve to the last digit are told, as a notice, on their block", () => {
    expect(screened([{ a: calculated }])).toMatchObject([
      {
        scope: "block",
        code: "calculated-values",
        severity: "notice",
        source: 0,
        suspectedCause: "calculated value copied",
      },
    ]);
  });

  test("are not suspected of measurements, of few points, or of values in few digits", () => {
    expect(screened([{ a: series(RANGE) }])).toEqual([]);
    expect(screened([{ a: calculated.slice(0, 5) }])).toEqual([]);
    expect(screened([{ a: calculated.map(([t, value]): Reading => [t, Number(value.toPrecision(2))]) }])).toEqual([]);
  });
});

describe("copies", () => {
  test("count once: a source that repeats another exactly has no vote of its own", () => {
    const wrong = series(WARM, (value) => Number((1.6 * value).toPrecision(4)));
    const input = inputOf([
      { a: wrong, b: wrong, c: series([12, 22, 32, 42, 52]), d: series([11, 21, 31, 41, 51], (value) => 1.02 * value) },
    ]);
    const [fit] = input.fits;
    expect(fit?.agreement).toBe("agreed");
    expect(fit?.soundSources).toEqual([2, 3]);
    expect(fit?.apartSources).toEqual([0]);
    const flags = screen(input);
    expect(flags.filter(({ scope, severity }) => scope === "block" && severity === "blocking")).toMatchObject([
      { source: 0 },
      { source: 1 },
    ]);
    expect(flags.find(({ code }) => code === "re-reported")).toMatchObject({ source: 1, severity: "notice" });
  });

  test("tell the chance that as many values are equal at their rounding", () => {
    const flags = screened([{ a: series(WARM), b: series(WARM) }]);
    expect(flags[0]?.evidence).toMatch(
      /^5 of its 5 values are those of a at the same temperatures, to the digits given; by chance about 1 in 10\^\d+$/,
    );
  });

  test("in two digits can be chance and are not told", () => {
    const coarse = series(WARM, (value) => Number(value.toPrecision(2)));
    expect(screened([{ a: coarse, b: coarse }]).filter(({ code }) => code === "re-reported")).toEqual([]);
  });
});

describe("half a unit of the last digit", () => {
  test("is taken from the number as written", () => {
    expect(relativeRounding(12.5)).toBeCloseTo(0.05 / 12.5, 12);
    expect(relativeRounding(-0.0042)).toBeCloseTo(0.00005 / 0.0042, 12);
    expect(relativeRounding(250)).toBeCloseTo(5 / 250, 12);
    expect(relativeRounding(3e-7)).toBeCloseTo(0.5 / 3, 12);
  });
});

describe("a temperature outside the liquid range", () => {
  test("that lands on the curve on another scale is blocking, and says where it then lies", () => {
    // 104 typed for 104 °F (40 °C) in a column of °C; the solvent boils at 78 °C.
    const misread: Reading[] = [...series([10, 20, 30, 50]), [104, thousandX(40)]];
    const sources = { a: misread, b: series([12, 22, 32, 42, 52], (value) => 1.02 * value), c: series(WARM) };
    const flags = screened([sources], { boilingPointK: 351, freezingPointK: 159 });
    expect(flags.find(({ code }) => code === "off-curve")).toMatchObject({
      severity: "blocking",
      row: 4,
      suspectedCause: "temperature unit",
      causeDetail: "temperature is in °F",
    });
    expect(flags.find(({ code }) => code === "off-curve")?.evidence).toMatch(
      /read at 40\.0 °C it lies \d\.\d % (above|below) the curve/,
    );
  });
});

describe("a conflict of two sources", () => {
  test("tells what would reconcile them, and leaves open which is wrong", () => {
    const mass = series(WARM, (value) => {
      const r = ((value / (1000 - value)) * 150) / 50;
      return Number(((1000 * r) / (1 + r)).toPrecision(4));
    });
    const [flag] = screened([{ a: series([12, 22, 32, 42, 52]), b: mass }]);
    expect(flag?.code).toBe("sources-disagree");
    expect(flag?.evidence).toContain(
      "b would agree with this put right: basis mix-up, 10^3 x should read g/kg solution",
    );
  });
});

describe("the kind of a system for its threshold", () => {
  const kindOf = (unit: string, temperatures: readonly number[], sources: readonly number[], aqueousSalt = false) => {
    const table = createMeasurementTable(10);
    for (const [row, T] of temperatures.entries()) {
      table.temperatureK[row] = T;
      table.source[row] = sources[row]!;
      table.reportedUnit[row] = codeOf(table.texts, unit);
    }
    const [system] = inputOf([{ a: series([25]) }]).systems;
    const identity = { ...system!.identity, aqueousSalt };
    return thresholdKind(table, { ...system!, identity, rows: Int32Array.from(temperatures.keys()) });
  };

  test("is a compilation for logarithms from several sources near one temperature", () => {
    expect(kindOf("log10(mol/L)", [298.15, 297.15, 299.15], [0, 1, 1])).toBe("one-temperature compilation");
    expect(kindOf("log10(mol/L)", [298.15, 297.15, 299.15], [0, 0, 0])).toBe("general");
    expect(kindOf("log10(mol/L)", [298.15, 308.15], [0, 1])).toBe("general");
    expect(kindOf("mg/mL solution", [298.15, 298.15], [0, 1])).toBe("general");
    expect(kindOf("g/100 g solvent", [298.15, 318.15], [0, 1], true)).toBe("aqueous salt");
  });
});
