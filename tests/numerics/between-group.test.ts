import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { derSimonianLaird, pauleMandel } from "../../pipeline/numerics/between-group.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

/** Log risk ratios of 13 vaccine trials and their variances; Colditz et al., JAMA 271 (1994) 698-702. */
const bcg = {
  y: [
    -0.88931133392, -1.5853886572, -1.3480731483, -1.44155119002, -0.217547322211, -0.786115585819, -1.6208982236,
    0.0119523335238, -0.469417648738, -1.37134480347, -0.339358828338, 0.445913400571, -0.0173139482169,
  ],
  v: [
    0.325584765004, 0.194581121398, 0.415367965368, 0.0200100319022, 0.0512101721696, 0.00690561845591, 0.223017247572,
    0.00396157929782, 0.0564342104632, 0.073024793613, 0.0124122139716, 0.5325058452, 0.071404659684,
  ],
};

describe("published consensus values", () => {
  test("the vaccine trials give the DerSimonian-Laird values of metafor", () => {
    // R metafor 3.8-1, rma(method = "DL"): tau^2 0.3088, pooled -0.7141 (SE 0.1787), Q 152.2330.
    const { betweenVariance, mean, standardError, cochranQ, degreesOfFreedom } = derSimonianLaird(bcg.y, bcg.v);
    expect(relativeError(betweenVariance, 0.308760262862)).toBeLessThan(1e-9);
    expect(relativeError(mean, -0.714117222073)).toBeLessThan(1e-9);
    expect(relativeError(standardError, 0.178742089535)).toBeLessThan(1e-9);
    expect(relativeError(cochranQ, 152.233008082)).toBeLessThan(1e-9);
    expect(degreesOfFreedom).toBe(12);
  });

  test("the vaccine trials give the Paule-Mandel values of metafor", () => {
    // R metafor 3.8-1, rma(method = "PM").
    const { betweenVariance, mean, standardError } = pauleMandel(bcg.y, bcg.v);
    expect(relativeError(betweenVariance, 0.318068452205)).toBeLessThan(1e-9);
    expect(relativeError(mean, -0.714968153493)).toBeLessThan(1e-9);
    expect(relativeError(standardError, 0.180892191538)).toBeLessThan(1e-9);
  });

  test("the heats of vaporisation of cadmium give tau^2 0.1052 and 26.712", () => {
    // Paule and Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385; digits from R metafor 3.8-1.
    const { betweenVariance, mean } = pauleMandel(
      [27.044, 26.022, 26.34, 26.787, 26.796],
      [0.003, 0.076, 0.464, 0.003, 0.014],
    );
    expect(relativeError(betweenVariance, 0.105219388249)).toBeLessThan(1e-9);
    expect(relativeError(mean, 26.7121287483)).toBeLessThan(1e-11);
  });

  test("the heats of vaporisation of cadmium give the DerSimonian-Laird value 0.0413 and 26.767 too", () => {
    // R metafor 3.8-1, rma(method = "DL") of the same five values.
    const { betweenVariance, mean, standardError, cochranQ } = derSimonianLaird(
      [27.044, 26.022, 26.34, 26.787, 26.796],
      [0.003, 0.076, 0.464, 0.003, 0.014],
    );
    expect(relativeError(betweenVariance, 0.0412699114641)).toBeLessThan(1e-9);
    expect(relativeError(mean, 26.7674823295)).toBeLessThan(1e-11);
    expect(relativeError(standardError, 0.116423259544)).toBeLessThan(1e-9);
    expect(relativeError(cochranQ, 22.6310745873)).toBeLessThan(1e-9);
  });

  test("two laboratories of Paule and Mandel give tau^2 112.74 and 209.04, the means of 6 and 2 results", () => {
    // Paule and Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385; digits from R metafor 3.8-1.
    const { betweenVariance, mean, standardError } = pauleMandel([201.533, 216.55], [0.154 ** 2 / 6, 0.25 ** 2 / 2]);
    expect(relativeError(betweenVariance, 112.737543167)).toBeLessThan(1e-9);
    expect(relativeError(mean, 209.040591119)).toBeLessThan(1e-9);
    expect(relativeError(standardError, 7.50849994499)).toBeLessThan(1e-9);
  });

  test("the eleven results for lead in wine give both estimates, far apart for the sake of one result", () => {
    // CCQM-K30, Hearn et al., Metrologia 45 (2008) Tech. Suppl. 08001; digits from R metafor 3.8-1.
    const y = [1.62, 2.893, 2.936, 2.94, 2.96, 2.98, 3, 3.001, 3.07, 3.13, 7.71];
    const v = [
      ...[0.001936, 0.000426723092861, 0.00015625, 0.00027225, 0.00111111111111, 0.0101007550314],
      ...[0.0025, 0.004624, 0.007225, 0.0036, 0.9801],
    ];
    const [pm, dl] = [pauleMandel(y, v), derSimonianLaird(y, v)];
    expect(relativeError(pm.betweenVariance, 1.52721063981)).toBeLessThan(1e-9);
    expect(relativeError(pm.mean, 3.13223996212)).toBeLessThan(1e-9);
    expect(relativeError(pm.standardError, 0.379784326222)).toBeLessThan(1e-9);
    expect(relativeError(dl.betweenVariance, 0.0830452950532)).toBeLessThan(1e-9);
    expect(relativeError(dl.mean, 2.88907815819)).toBeLessThan(1e-9);
    expect(relativeError(dl.standardError, 0.0924330193945)).toBeLessThan(1e-9);
    expect(relativeError(dl.cochranQ, 912.474034329)).toBeLessThan(1e-9);
  });

  interface Estimate {
    tau2: number;
    estimate: number;
    se: number;
  }
  interface Collection {
    datasets: Record<string, { y: number[]; v?: number[]; s?: number[]; n?: number[]; DL?: Estimate; PM: Estimate }>;
  }
  const collection = referenceValues<Collection>("07-random-effects.json");

  test.skipIf(!collection)(`all data sets agree with metafor to 1e-9 ${SKIPPED_WHERE_ABSENT}`, () => {
    for (const [name, { y, v, s, n, DL, PM }] of Object.entries(collection!.datasets)) {
      const variances = v ?? s!.map((sd, i) => sd ** 2 / n![i]!);
      const found = [[pauleMandel(y, variances), PM] as const];
      if (DL) found.push([derSimonianLaird(y, variances), DL]);
      for (const [consensus, expected] of found) {
        expect(relativeError(consensus.betweenVariance, expected.tau2), name).toBeLessThan(1e-9);
        expect(relativeError(consensus.mean, expected.estimate), name).toBeLessThan(1e-9);
        expect(relativeError(consensus.standardError, expected.se), name).toBeLessThan(1e-9);
      }
    }
  });
});

describe("properties", () => {
  const groups = fc.array(
    fc.record({ y: fc.double({ min: -5, max: 5, noNaN: true }), v: fc.double({ min: 1e-4, max: 4, noNaN: true }) }),
    { minLength: 2, maxLength: 8 },
  );

  test("with the Paule-Mandel variance the scatter is what its degrees of freedom promise, or less at 0", () => {
    fc.assert(
      fc.property(groups, (sample) => {
        const { betweenVariance, mean } = pauleMandel(
          sample.map(({ y }) => y),
          sample.map(({ v }) => v),
        );
        const q = sample.reduce((sum, { y, v }) => sum + (y - mean) ** 2 / (v + betweenVariance), 0);
        if (betweenVariance > 0) expect(q).toBeCloseTo(sample.length - 1, 8);
        else expect(q).toBeLessThanOrEqual(sample.length - 1 + 1e-9);
      }),
    );
  });

  test("with equal variances both give the variance of the means less that within", () => {
    const y = [1, 2, 4];
    const expected = 7 / 3 - 0.5;
    expect(derSimonianLaird(y, [0.5, 0.5, 0.5]).betweenVariance).toBeCloseTo(expected, 12);
    expect(pauleMandel(y, [0.5, 0.5, 0.5]).betweenVariance).toBeCloseTo(expected, 12);
  });

  test("a large common value does not blur the result", () => {
    const near = pauleMandel([1, 2, 4], [0.5, 0.4, 0.5]);
    const far = pauleMandel([1e9 + 1, 1e9 + 2, 1e9 + 4], [0.5, 0.4, 0.5]);
    expect(relativeError(far.betweenVariance, near.betweenVariance)).toBeLessThan(1e-6);
  });
});

describe("small and wrong input", () => {
  test("one group has no variance between, and 0 degrees of freedom say so", () => {
    expect(pauleMandel([3], [4])).toEqual({
      betweenVariance: 0,
      mean: 3,
      standardError: 2,
      cochranQ: 0,
      degreesOfFreedom: 0,
    });
    expect(derSimonianLaird([3], [4]).betweenVariance).toBe(0);
  });

  test("groups that agree have none either", () => {
    expect(derSimonianLaird([1, 1, 1], [1, 2, 3]).betweenVariance).toBe(0);
    expect(pauleMandel([1, 1, 1], [1, 2, 3]).betweenVariance).toBe(0);
  });

  test("no groups, lists of different length and variances that are not positive are refused", () => {
    expect(() => pauleMandel([], [])).toThrow(RangeError);
    expect(() => pauleMandel([1, 2], [1])).toThrow(/2 estimates and 1 variances/);
    expect(() => derSimonianLaird([1, 2], [1, 0])).toThrow(/variance 1 is 0/);
    expect(() => derSimonianLaird([1, Number.NaN], [1, 1])).toThrow(/estimate 1/);
  });
});
