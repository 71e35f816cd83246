import { expect, test } from "vitest";
import { quickHint } from "../../pipeline/fit/branches/quick-hint.ts";
import { pooledDegreesOfFreedom } from "../../pipeline/fit/system-scale.ts";
import { leastSquares } from "../../pipeline/numerics/least-squares.ts";
import { seededRandom } from "../../pipeline/numerics/random.ts";
import { pointsOfRows } from "./branch-support.ts";

const SD = 0.02;

function systemOf(fall: number, seed: number, sources = 2) {
  const random = seededRandom(seed);
  const rows = Array.from({ length: 16 }, (_, i) => {
    const [T, source] = [275 + 3.5 * i, i % sources];
    const u = 303 / T - 1;
    const y = -4 - 10 * u + 5 * u * u - (T > 303 ? -fall * u : 0) + 0.03 * source + SD * random.normal();
    return { T, source, y };
  });
  const points = pointsOfRows(rows);
  return { points, kept: new Uint8Array(points.n).fill(1), noiseSd: new Float64Array(points.n).fill(SD) };
}

test("the quick look gives what least squares with offsets, slope, curvature and one hinge gives at its best place", () => {
  for (const sources of [1, 2, 3]) {
    const robust = systemOf(8, 5 + sources, sources);
    const { temperatureK, lnValue, source, n } = robust.points;
    const [low, high] = [temperatureK[0]!, temperatureK[n - 1]!];
    const sumWith = (hinge: ((reciprocal: number) => number)[]) => {
      const design = Array.from(temperatureK, (T, i) => [
        ...Array.from({ length: sources }, (_, b) => (source[i] === b ? 1 : 0)),
        ...[303 / T - 1, (303 / T - 1) ** 2, ...hinge.map((of) => 303 * of(1 / T))],
      ]);
      const p = sources + 2 + hinge.length;
      return leastSquares(Float64Array.from(design.flat()), lnValue, n, p).residualSumOfSquares / SD ** 2;
    };
    const smooth = sumWith([]);
    const places = Array.from({ length: 9 }, (_, k) => 1 / high + ((1 / low - 1 / high) * (k + 1)) / 10);
    const least = Math.min(...places.map((at) => sumWith([(x) => Math.max(0, at - x)])));
    const left = (pooledDegreesOfFreedom + least) / (pooledDegreesOfFreedom + n - 5);
    expect(quickHint(robust)).toBeCloseTo((smooth - least) / left, 6);
  }
});

test("the quick look stops four of five smooth systems and none with a clear break", () => {
  const share = (fall: number) => {
    let passed = 0;
    for (let seed = 0; seed < 300; seed++) if (quickHint(systemOf(fall, seed)) >= 5) passed++;
    return passed / 300;
  };
  expect(share(0)).toBeLessThan(0.25);
  expect(share(14)).toBe(1);
});

test("the quick look asks for six points", () => {
  const { points, noiseSd } = systemOf(14, 1);
  expect(quickHint({ points, noiseSd, kept: Uint8Array.from(points.source, (_, i) => (i < 5 ? 1 : 0)) })).toBe(0);
});
