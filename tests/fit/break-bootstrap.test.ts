import { describe, expect, test } from "vitest";
import { bestBreak, bootstrapBreak, leastStatistic, seedOf } from "../../pipeline/fit/branches/break-bootstrap.ts";
import { breakProfile } from "../../pipeline/fit/branches/break-profile.ts";
import { type BreakPoints, breakScan, smoothRival } from "../../pipeline/fit/branches/break-scan.ts";
import { findBreak } from "../../pipeline/fit/branches/two-branch-fit.ts";
import { leastSquares } from "../../pipeline/numerics/least-squares.ts";
import { seededRandom } from "../../pipeline/numerics/random.ts";
import { breakPointsOf } from "./branch-support.ts";

/**
 * Stagnant band height of water against flow rate, both as decimal logarithms: R. A. Cook, data in D. W. Bacon and
 * D. G. Watts, Biometrika 58 (1971) 525-534. Broken line by R 4.2.2, package segmented 1.6-2 (V. Muggeo): break 0.041106
 * (standard error 0.0228), residual sum of squares 0.00914020; one straight line leaves 0.393923.
 */
const FLOW = [
  -0.8, 0.01, -0.25, -0.25, -0.12, -0.12, -0.94, 0.11, 0.11, -0.63, -0.63, -1.39, -1.39, 0.7, 0.7, 0.34, 1.19, 0.59,
  0.85, 0.85, 0.99, 0.99, 0.25, -1.08, -1.08, 0.44, 0.34, 0.25,
];
const HEIGHT = [
  0.9, 0.51, 0.65, 0.67, 0.6, 0.59, 0.92, 0.43, 0.43, 0.81, 0.83, 1.12, 1.12, -0.13, -0.14, 0.25, -0.65, -0.01, -0.3,
  -0.33, -0.46, -0.43, 0.33, 0.99, 1.03, 0.13, 0.24, 0.3,
];

/** Flow rates as temperatures over 25 K with u = -0.03 x, heights times 100: the held curvature is then as good as none. */
const [T0, SCALE, SD] = [300, 0.03, 2];
const band: BreakPoints = breakPointsOf(
  FLOW.map((x, i) => ({ T: T0 / (1 - SCALE * x), y: 100 * HEIGHT[i]! })),
  SD,
);
const flowAt = (temperatureK: number) => (1 - T0 / temperatureK) / SCALE;

describe("the broken line through the stagnant band heights", () => {
  const scan = breakScan(band, { side: 3, perGap: 60 })!;
  const best = bestBreak(scan, scan.residuals, scan.smoothSum, "falls");

  test("leaves the residual sum of squares and lies at the break that segmented gives", () => {
    const sum = ((scan.smoothSum - best.gain) * SD ** 2) / 1e4;
    expect(sum).toBeCloseTo(0.0091402, 4);
    expect(flowAt(scan.breakK[best.position]!)).toBeCloseTo(0.0411, 2);
  });

  test("has limits from the profile about as wide as the standard error says", () => {
    const { breakK, lowK, highK } = breakProfile(band, "falls", 3)!;
    expect(flowAt(breakK)).toBeCloseTo(0.0411, 2);
    // 0.0411 + 2.06 x 0.0228; the profile is wider below, where a measured value lies in the way.
    expect(flowAt(highK)).toBeCloseTo(0.0882, 2);
    expect(flowAt(lowK)).toBeGreaterThan(-0.05);
    expect(flowAt(lowK)).toBeLessThan(0);
  });

  test("has p = 0.001, the least that 999 replicates can give; the Davies test of segmented gives 1e-17", () => {
    expect(bootstrapBreak(scan, best.statistic, "falls", 0.01, 1).probability).toBe(0.001);
    expect(bestBreak(scan, scan.residuals, scan.smoothSum, "rises").gain).toBeLessThan(best.gain / 100);
  });

  test("is yet no sharp break: a smooth curve of as many coefficients follows better, as Bacon and Watts found", () => {
    expect(smoothRival(band)).toBeLessThan(scan.smoothSum - best.gain);
    expect(findBreak(band, 1)).toBeUndefined();
  });
});

describe("the scan", () => {
  const random = seededRandom(3);
  const rows = Array.from({ length: 14 }, (_, i) => ({
    ...{ T: 275 + 5 * i, source: i % 2 },
    y: -4 + 0.02 * 5 * i - 0.015 * Math.max(0, 5 * i - 30) + 0.01 * random.normal(),
  }));
  const points = breakPointsOf(rows, 0.01, 0.03);

  test("gives the residual sums of squares of generalised least squares with the covariance written out", () => {
    const scan = breakScan(points, { side: 3, perGap: 1 })!;
    const { whitened, rank } = whitenedDesign(scan.breakK[4]!);
    expect(rank).toBe(5);
    const components = [0, 1].map((j) => {
      let sum = 0;
      for (let i = 0; i < scan.rows; i++) sum += scan.directions[(2 * 4 + j) * scan.rows + i]! * scan.residuals[i]!;
      return sum;
    });
    expect(scan.smoothSum - components[0]! ** 2 - components[1]! ** 2).toBeCloseTo(whitened, 6);
  });

  /** The same by a covariance matrix, its Cholesky factor, and least squares on the whitened rows. */
  function whitenedDesign(breakK: number): { whitened: number; rank: number } {
    const n = rows.length;
    const K = rows.map((a, i) => rows.map((b, j) => (i === j ? 1e-4 : 0) + (a.source === b.source ? 9e-4 : 0)));
    const L = K.map(() => new Array<number>(n).fill(0));
    for (let i = 0; i < n; i++)
      for (let j = 0; j <= i; j++) {
        const sum = K[i]![j]! - L[i]!.reduce((s, l, k) => s + (k < j ? l * L[j]![k]! : 0), 0);
        L[i]![j] = i === j ? Math.sqrt(sum) : sum / L[j]![j]!;
      }
    const forward = (column: readonly number[]) => {
      const out: number[] = [];
      for (let i = 0; i < n; i++) out.push((column[i]! - out.reduce((s, x, k) => s + L[i]![k]! * x, 0)) / L[i]![i]!);
      return out;
    };
    const Tc = n / rows.reduce((s, { T }) => s + 1 / T, 0);
    const u = rows.map(({ T }) => Tc / T - 1);
    const ub = Tc / breakK - 1;
    const c = (x: number) => x - Math.log1p(x);
    const bend = (x: number) => c(x) - c(ub) - ((x - ub) * ub) / (1 + ub);
    const columns = [
      u.map(() => 1),
      u,
      u.map(c),
      u.map((x) => (x < ub ? ub - x : 0)),
      u.map((x) => (x < ub ? bend(x) : 0)),
    ].map(forward);
    // The change of curvature is known to be of the size 9 sqrt 2: one more observation, of 0.
    const design = Float64Array.from([
      ...u.flatMap((_, i) => columns.map((column) => column[i]!)),
      ...[0, 0, 0, 0, 1 / (9 * Math.SQRT2)],
    ]);
    const response = Float64Array.from([...forward(rows.map(({ y }) => y)), 0]);
    const fit = leastSquares(design, response, n + 1, 5);
    return { whitened: fit.residualSumOfSquares, rank: fit.rank };
  }
});

describe("the parametric bootstrap", () => {
  test("gives p below 0.05 for about one in twenty smooth series, position and sense searched", () => {
    const random = seededRandom(20);
    let [below, series] = [0, 0];
    for (; series < 300; series++) {
      const rows = Array.from({ length: 12 }, (_, i) => ({
        T: 275 + 6 * i,
        y: -4 + 0.02 * 6 * i - 1e-4 * (6 * i) ** 2 + 0.02 * random.normal(),
      }));
      const points = breakPointsOf(rows, 0.02);
      const scan = breakScan(points, { side: 3, perGap: 3 })!;
      const { statistic } = bestBreak(scan, scan.residuals, scan.smoothSum, "falls");
      if (bootstrapBreak(scan, statistic, "falls", 0.05, series).probability < 0.05) below++;
    }
    // 15 of 300 expected; 99.9 % of binomial counts lie in 4 to 28.
    expect(below).toBeGreaterThanOrEqual(4);
    expect(below).toBeLessThanOrEqual(28);
  });

  test("is the same for the same seed, and its seed follows from the system's id", () => {
    const scan = breakScan(band, { side: 3, perGap: 2 })!;
    const replicates = (seed: number) => [...bootstrapBreak(scan, 1e9, "falls", 0.01, seed).replicates.slice(-5)];
    expect(replicates(7)).toEqual(replicates(7));
    expect(replicates(7)).not.toEqual(replicates(8));
    // FNV-1a of "a" and of the empty text, from the reference vectors of its authors (Fowler, Noll and Vo).
    expect([seedOf("a"), seedOf("")]).toEqual([0xe40c292c, 0x811c9dc5]);
  });

  test("is not needed below the value that F(2, v) asks for at a place known beforehand", () => {
    // n = 12: v = 4 + 7; F(2, 11) is exceeded with 2 % at 5.70.
    expect(leastStatistic(12, 0.01) / 2).toBeCloseTo(5.7, 1);
  });
});

/** Annual flow of the Nile at Aswan, 1871 to 1970: a fall of level in 1898, no kink (Cobb, Biometrika 65 (1978) 243). */
const NILE = [
  1120, 1160, 963, 1210, 1160, 1160, 813, 1230, 1370, 1140, 995, 935, 1110, 994, 1020, 960, 1180, 799, 958, 1140, 1100,
  1210, 1150, 1250, 1260, 1220, 1030, 1100, 774, 840, 874, 694, 940, 833, 701, 916, 692, 1020, 1050, 969, 831, 726, 456,
  824, 702, 1120, 1100, 832, 764, 821, 768, 845, 864, 862, 698, 845, 744, 796, 1040, 759, 781, 865, 845, 944, 984, 897,
  822, 1010, 771, 676, 649, 846, 812, 742, 801, 1040, 860, 874, 848, 890, 744, 749, 838, 1050, 918, 986, 797, 923, 975,
  815, 1020, 906, 901, 1170, 912, 746, 919, 718, 714, 740,
];

test("a jump is no kink: the flow of the Nile has a break of level, which strucchange finds, and none of slope", () => {
  const rows = NILE.map((y, i) => ({ T: T0 / (1 - 0.002 * i), y }));
  expect(findBreak(breakPointsOf(rows, 130), 1)).toBeUndefined();
});
