import { inverse, Matrix } from "ml-matrix";
import { describe, expect, test } from "vitest";
import { fitWorkspace } from "../../pipeline/fit/fit-workspace.ts";
import { generalisedLeastSquares } from "../../pipeline/fit/generalised-least-squares.ts";
import { setRandomIntercept } from "../../pipeline/fit/random-intercept.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import { systemScale } from "../../pipeline/fit/system-scale.ts";
import { pauleMandel } from "../../pipeline/numerics/between-group.ts";
import { ownLnU, type SystemPoints, sharedVarianceOf } from "../../pipeline/records/systems.ts";
import { curveThrough, expectCurve, plainPoints } from "./plain-system.ts";
import { pointsOf } from "./robust-support.ts";

const WARM = [280, 286, 292, 298, 304, 310, 316, 322, 328, 334];
const onLine = (T: number) => -4 - 2500 * (1 / T - 1 / 305);
/** Small scatter that a line sees nothing of: +, -, -, + over four temperatures. */
const scatter = (i: number) => 0.004 * ([1, -1, -1, 1][i % 4] as number);

/** Series of ten temperatures on one line, each shifted, with an uncertainty its points share. */
function shifted(series: readonly { shift: number; shared?: number; times?: number }[], lnU = 0.02): SystemPoints {
  const rows = series.flatMap(({ shift, shared = 0, times = 1 }, source) =>
    Array.from({ length: times * WARM.length }, (_, i) => ({ source, shift, shared, T: WARM[i % 10] as number, i })),
  );
  const points = plainPoints(
    rows.map(({ T }) => T),
    rows.map(({ T, shift, i }) => onLine(T) + shift + scatter(i)),
    rows.map(({ source }) => source),
    lnU,
  );
  return { ...points, sharedLnU: Float64Array.from(rows, ({ shared }) => shared) };
}

describe("what the points of a source share", () => {
  test("is taken out of each point's own uncertainty, which keeps at least a hundredth of the variance", () => {
    const points = { ...plainPoints([300, 300, 300, 300], [-4, -4, -4, -4], [], 0.05) };
    const withShares = { ...points, sharedLnU: Float64Array.of(0.03, 0.05, 0.2, Number.NaN) };
    expect(ownLnU(withShares, 0)).toBeCloseTo(0.04, 12);
    expect(sharedVarianceOf(withShares, 0)).toBeCloseTo(9e-4, 12);
    expect(ownLnU(withShares, 1)).toBeCloseTo(0.005, 12);
    expect(sharedVarianceOf(withShares, 2)).toBeCloseTo(25e-4, 12);
    expect([ownLnU(withShares, 3), sharedVarianceOf(withShares, 3)]).toEqual([0.05, 0]);
    expect([ownLnU(points, 0), sharedVarianceOf(points, 0)]).toEqual([0.05, 0]);
  });

  test("stands in the covariance of a source's offset: the fit equals the matrix formula", () => {
    const block = [0, 0, 0, 1, 1, 2, 2];
    const variance = Float64Array.of(4e-4, 9e-4, 4e-4, 1e-4, 2e-4, 1e-3, 5e-4);
    const u = [-0.08, -0.01, 0.06, -0.05, 0.02, 0, 0.07];
    const y = Float64Array.of(-4.1, -4.6, -5.3, -4.25, -4.9, -4.8, -5.4);
    const parts = { perLaboratory: [2, 1, 2], sharedVariance: [0, 25e-4, 1e-4] };
    const offset = [0, 1, 2].map(
      (b) => (parts.perLaboratory[b] as number) * 9e-4 + (parts.sharedVariance[b] as number),
    );
    const ws = fitWorkspace(7);
    block.forEach((b, i) => {
      ws.block[i] = b;
      (ws.columns[0] as Float64Array)[i] = 1;
      (ws.columns[1] as Float64Array)[i] = u[i] as number;
    });
    setRandomIntercept(ws.common, 7, 3, variance, 1, 9e-4, parts);
    const fit = generalisedLeastSquares(ws, ws.common, y, 2, Number.POSITIVE_INFINITY);
    const K = new Matrix(
      block.map((a, i) =>
        block.map((b, j) => (a === b ? (offset[a] as number) : 0) + (i === j ? (variance[i] as number) : 0)),
      ),
    );
    const F = new Matrix(u.map((value) => [1, value]));
    const C = inverse(F.transpose().mmul(inverse(K)).mmul(F));
    const b = C.mmul(F.transpose())
      .mmul(inverse(K))
      .mmul(Matrix.columnVector(Array.from(y)));
    expect(fit?.coefficients[0]).toBeCloseTo(b.get(0, 0), 10);
    expect(fit?.coefficients[1]).toBeCloseTo(b.get(1, 0), 9);
    expect((fit?.covariance[0] as number) / C.get(0, 0)).toBeCloseTo(1, 9);
  });

  test("does not average out over its points: forty more points narrow nothing", () => {
    const half = (times: number) =>
      expectCurve(curveThrough(shifted([{ shift: 0, shared: 0.03, times }], 0.036))).limits(305).curve;
    // One source: tau^2 + s^2 is added whole, 1.96 sqrt(0.04^2 + 0.03^2) = 0.098.
    expect(half(40)).toBeGreaterThan(0.098);
    expect(half(40)).toBeGreaterThan(0.97 * half(4));
    expect(half(40)).toBeLessThan(0.1);
  });

  test("takes weight from its source: the curve moves to the one that is sure of its level", () => {
    const level = (shared: number) =>
      expectCurve(curveThrough(shifted([{ shift: 0.06, shared }, { shift: 0 }], 0.08))).evaluate(305);
    const even = level(0) - onLine(305);
    const unsure = level(0.07) - onLine(305);
    expect(even).toBeCloseTo(0.03, 3);
    // Weights 1/(0.04^2 + 0.07^2) and 1/0.04^2, the scatter aside: 0.06 x 0.0016/(0.0016 + 0.0065) = 0.0118.
    expect(unsure).toBeGreaterThan(0.011);
    expect(unsure).toBeLessThan(0.0135);
  });

  test("makes sources agree that differ by no more than it", () => {
    const series = (shared: number) => shifted([{ shift: 0.5, shared }, { shift: 0 }], Math.hypot(0.02, shared));
    const agreement = (points: SystemPoints) => robustFits([points], [{ aqueousSalt: false }], 2).fits[0]?.agreement;
    expect(agreement(series(0))).toBe("conflict");
    expect(agreement(series(0.25))).toBe("agreed");
  });
});

describe("sources of one laboratory", () => {
  const level = (laboratories: readonly string[]) =>
    expectCurve(curveThrough(shifted([{ shift: 0.06 }, { shift: 0.06 }, { shift: 0 }]), { laboratories })).evaluate(
      305,
    ) - onLine(305);

  test("weigh together as much as one", () => {
    expect(level(["north", "south", "east"])).toBeCloseTo(0.04, 3);
    expect(level(["north", "north", "east"])).toBeCloseTo(0.03, 3);
    expect(level(["", "", ""])).toBeCloseTo(0.04, 3);
  });

  test("have one vote: two of them against another laboratory are no majority, two laboratories are", () => {
    const points = pointsOf(
      { source: 0, celsius: [10, 20, 30, 40, 50], shift: 0.5 },
      { source: 1, celsius: [10, 20, 30, 40, 50], shift: 0.5 },
      { source: 2, celsius: [10, 20, 30, 40, 50] },
    );
    const fitted = (laboratories: readonly string[]) =>
      robustFits([points], [{ aqueousSalt: false }], 3, { laboratories }).fits[0];
    expect(fitted(["north", "south", "east"])).toMatchObject({
      agreement: "agreed",
      soundSources: [0, 1],
      apartSources: [2],
    });
    expect(fitted(["", "", ""])).toMatchObject({ agreement: "agreed", apartSources: [2] });
    const one = fitted(["north", "north", "east"]);
    expect(one?.agreement).toBe("conflict");
    expect(one?.camps.map((camp) => [...camp])).toContainEqual([0, 1]);
  });

  test("that disagree among themselves still have a majority of three", () => {
    const points = pointsOf(
      { source: 0, celsius: [10, 20, 30, 40, 50] },
      { source: 1, celsius: [12, 22, 32, 42, 52] },
      { source: 2, celsius: [14, 24, 34, 44, 54], shift: 0.5 },
    );
    const [fit] = robustFits([points], [{ aqueousSalt: false }], 3, { laboratories: ["north", "north", "north"] }).fits;
    expect(fit).toMatchObject({ agreement: "agreed", apartSources: [2] });
  });
});

describe("the variance between sources of one system", () => {
  /** One value a source, all at one temperature: a slope of 0 +- 10 that the values say nothing of, as limits take it. */
  function raised(y: readonly number[], v: readonly number[]): number {
    const ws = fitWorkspace(y.length);
    y.forEach((_, i) => {
      ws.block[i] = i;
      (ws.columns[0] as Float64Array)[i] = 1;
      (ws.columns[1] as Float64Array)[i] = 0;
    });
    const parts = { perLaboratory: y.map(() => 1), sharedVariance: y.map(() => 0) };
    const basis = { n: y.length, nSources: y.length, p: 2, lastSd: 10, parts };
    return systemScale(ws, basis, Float64Array.from(y), Float64Array.from(v), 0).betweenVariance;
  }

  test("is raised to the value of Paule and Mandel, here of their cadmium example", () => {
    // Paule and Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385; R metafor 3.8-1 gives 0.105219388249.
    const y = [27.044, 26.022, 26.34, 26.787, 26.796];
    const v = [0.003, 0.076, 0.464, 0.003, 0.014];
    expect(raised(y, v)).toBeCloseTo(0.105219388, 8);
    expect(raised(y, v)).toBeCloseTo(pauleMandel(y, v).betweenVariance, 8);
  });

  test("and of thirteen vaccine trials", () => {
    // Log risk ratios of Colditz et al., JAMA 271 (1994) 698-702; R metafor 3.8-1 gives 0.318068452205.
    const y = [
      ...[
        -0.88931133392, -1.5853886572, -1.3480731483, -1.44155119002, -0.217547322211, -0.786115585819, -1.6208982236,
      ],
      ...[0.0119523335238, -0.469417648738, -1.37134480347, -0.339358828338, 0.445913400571, -0.0173139482169],
    ];
    const v = [
      ...[0.325584765004, 0.194581121398, 0.415367965368, 0.0200100319022, 0.0512101721696, 0.00690561845591],
      ...[
        0.223017247572, 0.00396157929782, 0.0564342104632, 0.073024793613, 0.0124122139716, 0.5325058452,
        0.071404659684,
      ],
    ];
    expect(raised(y, v)).toBeCloseTo(0.318068452, 7);
  });
});
