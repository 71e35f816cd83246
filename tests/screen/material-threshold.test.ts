import { describe, expect, test } from "vitest";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { materialThreshold, type ThresholdKind } from "../../pipeline/screen/material-threshold.ts";

const percent = (level: number, lnU: number, kind: ThresholdKind = "general") =>
  100 * Math.expm1(materialThreshold(level, lnU, kind, DEFAULT_SETTINGS));

describe("the material threshold", () => {
  test("is 10 % from 10 mg/mL up, 15 % from 1, 25 % from 0.1 and a factor 1.6 below", () => {
    expect(percent(10, 0)).toBeCloseTo(10, 9);
    expect(percent(9.9, 0)).toBeCloseTo(15, 9);
    expect(percent(0.99, 0)).toBeCloseTo(25, 9);
    expect(percent(0.099, 0)).toBeCloseTo(60, 9);
  });

  test("is 5 % for salts in water at any level", () => {
    expect(percent(300, 0, "aqueous salt")).toBeCloseTo(5, 9);
    expect(percent(0.01, 0, "aqueous salt")).toBeCloseTo(5, 9);
  });

  test("is at least three standard uncertainties of the value", () => {
    expect(materialThreshold(50, 0.06, "general", DEFAULT_SETTINGS)).toBeCloseTo(0.18, 12);
    expect(materialThreshold(50, Number.NaN, "general", DEFAULT_SETTINGS)).toBeCloseTo(Math.log(1.1), 12);
  });

  test("is half a decade for compilations near one temperature", () => {
    expect(materialThreshold(50, 0.05, "one-temperature compilation", DEFAULT_SETTINGS)).toBeCloseTo(1.1513, 4);
  });

  test("follows the settings", () => {
    const strict = { ...DEFAULT_SETTINGS, material_threshold_uncertainties: 2 };
    expect(materialThreshold(50, 0.06, "general", strict)).toBeCloseTo(0.12, 12);
  });
});
