import fc from "fast-check";
import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { describe, expect, test } from "vitest";
import { isCurve, publishedCurve } from "../../pipeline/fit/published-curve.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import { withStandings } from "../../pipeline/fit/sources/with-standings.ts";
import type { RobustFit, SourceStanding, SystemFit } from "../../pipeline/records/fits.ts";
import type { SystemPoints } from "../../pipeline/records/systems.ts";
import { defaultContext, expectCurve, plainPoints, plainSystem } from "./plain-system.ts";
import { lineAt, pointsOf, type Series } from "./robust-support.ts";

const subject = { system: plainSystem(), meltingPointK: Number.NaN };

/** One system, fitted as an edition fits it, with the scales of an edition that knows nothing yet. */
function fitted(points: SystemPoints, sources: number, laboratories: readonly string[] = []): SystemFit {
  const [robust] = robustFits([points], [{ aqueousSalt: false }], sources, { laboratories }).fits;
  return withCurve(robust as RobustFit, laboratories);
}

function withCurve(robust: RobustFit, laboratories: readonly string[] = []): SystemFit {
  const context = { ...defaultContext, laboratories };
  const outcome = publishedCurve(robust, { ...subject, branch: 1 }, context);
  return withStandings({ robust, curves: isCurve(outcome) ? [outcome] : [] }, subject, context);
}

const standingsOf = (fit: SystemFit): readonly SourceStanding[] => fit.standings?.() ?? [];

const FIVE = [10, 20, 30, 40, 50];
const TEN = [10, 14, 18, 22, 26, 30, 34, 38, 42, 46];

/** A screening fit that keeps every point; what standings do not look at is left blank. */
function allKept(points: SystemPoints): RobustFit {
  const blank = new Float64Array(points.n);
  return {
    ...{ system: 0, points, agreement: "agreed", kept: new Uint8Array(points.n).fill(1), camps: [], apartSources: [] },
    ...{ predicted: blank, deviation: blank, deviationSd: blank, noiseSd: new Float64Array(points.n).fill(0.02) },
    ...{ betweenSd: 0.04, breakTemperatureK: Number.NaN, degreesOfFreedom: 20, soundSources: [] },
  };
}

/** Sources without scatter that lie apart by these shifts, at the same temperatures. */
function exact(shifts: readonly number[], celsius: readonly number[] = FIVE): SystemPoints {
  const rows = shifts.flatMap((shift, source) => celsius.map((t) => ({ source, T: t + 273.15, y: lineAt(t) + shift })));
  return plainPoints(
    rows.map(({ T }) => T),
    rows.map(({ y }) => y),
    rows.map(({ source }) => source),
  );
}

describe("the offset of a source", () => {
  test("is its distance from the mean of the others where all measured the same temperatures", () => {
    const offsets = standingsOf(withCurve(allKept(exact([0.03, 0, -0.06])))).map(({ offset }) => offset);
    expect(offsets[0]).toBeCloseTo(0.03 + 0.03, 8);
    expect(offsets[1]).toBeCloseTo(0 + 0.015, 8);
    expect(offsets[2]).toBeCloseTo(-0.06 - 0.015, 8);
  });

  test("has limits that hold the offset of the other sources and its own scatter, by the formula", () => {
    const [first] = standingsOf(withCurve(allKept(exact([0.02, 0, 0.01, -0.01]))));
    const { low, high, offset } = first as SourceStanding;
    expect((low + high) / 2).toBeCloseTo(offset, 10);
    // Three others with tau 4 % (a default, known): 1.96 x 0.04/sqrt(3) = 0.0453; the scatter adds a little.
    expect(high - offset).toBeGreaterThan(0.0453);
    expect(high - offset).toBeLessThan(0.05);
  });

  test("is compared at the temperatures of the others only, and is nothing where there are none in common", () => {
    const overlap = pointsOf(
      { source: 0, celsius: [10, 20, 30, 40, 50] },
      { source: 1, celsius: [38, 48, 58, 68, 78] },
    );
    expect(standingsOf(fitted(overlap, 2)).map(({ n, compared }) => [n, compared])).toEqual([
      [5, 2],
      [5, 2],
    ]);
    const apart = pointsOf({ source: 0, celsius: [5, 10, 15, 20, 25] }, { source: 1, celsius: [40, 45, 50, 55, 60] });
    for (const { compared, offset, low, high } of standingsOf(fitted(apart, 2)))
      expect([compared, offset, low, high]).toEqual([0, Number.NaN, Number.NaN, Number.NaN]);
  });

  test("is worked out for a source that the fit leaves out as a whole, which then has no influence", () => {
    const points = pointsOf(
      { source: 0, celsius: FIVE },
      { source: 1, celsius: FIVE },
      { source: 2, celsius: FIVE, shift: Math.log(1.5) },
    );
    const odd = standingsOf(fitted(points, 3))[2] as SourceStanding;
    expect(odd).toMatchObject({ source: 2, n: 0, compared: 5, influence: 0 });
    expect(odd.offset).toBeCloseTo(Math.log(1.5), 1);
    expect(odd.low).toBeGreaterThan(0.2);
    expect(odd).not.toHaveProperty("without");
  });

  test("has 95 % limits that hold the true offset in 92 to 98 of 100 simulated cases", () => {
    const generator = xoroshiro128plus(5);
    const uniform = () => uniformFloat64(generator);
    const gaussian = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
    const truth: number[][] = [];
    const systems = Array.from({ length: 400 }, (_, s) => {
      const k = 2 + (s % 3);
      const shifts = Array.from({ length: k }, () => 0.03 * gaussian());
      truth.push(shifts);
      const rows = shifts.flatMap((shift, source) =>
        TEN.map((t) => ({ source, T: t + 273.15, y: lineAt(t) + shift + 0.015 * gaussian() })),
      );
      return plainPoints(
        rows.map(({ T }) => T),
        rows.map(({ y }) => y),
        rows.map(({ source }) => source),
      );
    });
    const { fits, scales } = robustFits(
      systems,
      systems.map(() => ({ aqueousSalt: false })),
      4,
    );
    let [held, all] = [0, 0];
    fits.forEach((robust, s) => {
      const context = { ...defaultContext, scales };
      for (const { source, low, high } of standingsOf(withStandings({ robust, curves: [] }, subject, context))) {
        all++;
        const offset = truth[s]?.[source] as number;
        if (low <= offset && offset <= high) held++;
      }
    });
    expect(all).toBeGreaterThan(1100);
    expect(held / all).toBeGreaterThan(0.92);
    expect(held / all).toBeLessThan(0.98);
  });
});

describe("the influence of a source", () => {
  const points = pointsOf(
    { source: 0, celsius: FIVE, shift: 0.04 },
    { source: 1, celsius: [10, 20, 30, 40] },
    { source: 2, celsius: [20, 30, 40, 50], shift: -0.02 },
  );

  test("is the largest change when the curve is published again without its points", () => {
    const fit = fitted(points, 3);
    const curve = expectCurve(fit.curves[0] as (typeof fit.curves)[0]);
    for (const { source, influence, without } of standingsOf(fit)) {
      const kept = fit.robust.kept.map((mark, i) => (points.source[i] === source ? 0 : mark));
      const again = expectCurve(publishedCurve({ ...fit.robust, kept }, { ...subject, branch: 1 }, defaultContext));
      expect(again.model).toBe(curve.model);
      const [low, high] = again.temperatureRangeK;
      const places = Array.from({ length: 25 }, (_, i) => low + ((high - low) * i) / 24);
      const inside = places.filter((T) => T >= curve.temperatureRangeK[0] && T <= curve.temperatureRangeK[1]);
      const change = Math.max(...inside.map((T) => Math.abs(curve.evaluate(T) - again.evaluate(T))));
      expect(influence).toBeCloseTo(change, 3);
      expect(without?.n).toBe(again.n);
      for (const T of places) expect(without?.evaluate(T)).toBeCloseTo(again.evaluate(T), 9);
    }
  });

  test("of a source without which no slope is left is against the simplest curve of the rest", () => {
    const lone = pointsOf({ source: 0, celsius: FIVE }, { source: 1, celsius: [30, 30] });
    const [first, second] = standingsOf(fitted(lone, 2));
    expect(first?.without).toMatchObject({ model: "constant", n: 2, nSources: 1 });
    expect(second?.without).toMatchObject({ model: "van 't Hoff", n: 5 });
    expect(second?.influence).toBeLessThan(0.02);
  });

  test("and its standing are absent where there is one source", () => {
    expect(fitted(pointsOf({ source: 0, celsius: FIVE }), 1).standings).toBeUndefined();
  });
});

describe("sixty points of one laboratory against three studies of five", () => {
  const sixty = Array.from({ length: 60 }, (_, i) => 10 + (i * 40) / 59);
  const studies: Series[] = [1, 2, 3].map((source) => ({ source, celsius: FIVE }));
  const points = pointsOf({ source: 0, celsius: sixty, shift: 0.08 }, ...studies);
  const fit = fitted(points, 4);

  test("weigh as one source of four: the curve lies a quarter of the way, where plain least squares lies four fifths", () => {
    const curve = expectCurve(fit.curves[0] as (typeof fit.curves)[0]);
    expect(curve.n).toBe(75);
    const moved = curve.evaluate(303.15) - lineAt(30);
    expect(moved).toBeGreaterThan(0.017);
    expect(moved).toBeLessThan(0.024);
    const mean =
      points.lnValue.reduce((sum, y, i) => sum + y - lineAt((points.temperatureK[i] as number) - 273.15), 0) / 75;
    expect(mean).toBeGreaterThan(0.06);
  });

  test("stand apart from the others by what they are, and the others from them by a third of it", () => {
    const [large, ...small] = standingsOf(fit);
    expect(large?.offset).toBeCloseTo(0.08, 2);
    for (const { offset } of small) expect(offset).toBeCloseTo(-0.08 / 3, 2);
  });

  test("do not outvote them where they are far off: the three stay, the sixty go", () => {
    const far = fitted(pointsOf({ source: 0, celsius: sixty, shift: 0.5 }, ...studies), 4);
    expect(far.robust).toMatchObject({ agreement: "agreed", soundSources: [1, 2, 3], apartSources: [0] });
    expect(far.curves[0]?.n).toBe(15);
  });
});

test("Branches of a curve are told apart: a source has a standing on each that it reaches", () => {
  const points = exact([0.03, 0, -0.01], [10, 20, 30, 40, 50, 60]);
  const robust = allKept(points);
  const curveOf = (branch: number, inside: (celsius: number) => boolean) => {
    const kept = robust.kept.map((_, i) => (inside((points.temperatureK[i] as number) - 273.15) ? 1 : 0));
    return expectCurve(publishedCurve({ ...robust, kept }, { ...subject, branch }, defaultContext));
  };
  const curves = [curveOf(1, (t) => t < 35), curveOf(2, (t) => t > 35)];
  const standings = standingsOf(withStandings({ robust, curves }, subject, defaultContext));
  expect(standings.map(({ branch, source, n }) => [branch, source, n])).toEqual([
    ...[0, 1, 2].map((source) => [1, source, 3]),
    ...[0, 1, 2].map((source) => [2, source, 3]),
  ]);
  for (const { source, offset, without } of standings) {
    expect(offset).toBeCloseTo([0.035, -0.01, -0.025][source] as number, 8);
    expect(without?.n).toBe(6);
  }
});

test("Values that are no measurements never break off the comparison: every figure is finite or absent", () => {
  const T = fc.oneof(fc.double({ min: 250, max: 400, noNaN: true }), fc.constantFrom(Number.NaN, 0, -5, 1e9, Infinity));
  const y = fc.oneof(fc.double({ min: -9, max: 0, noNaN: true }), fc.constantFrom(Number.NaN, -Infinity, 1e5));
  const u = fc.oneof(fc.double({ min: 0.001, max: 0.2, noNaN: true }), fc.constantFrom(Number.NaN, 0, Infinity));
  const row = fc.record({ T, y, u, shared: u, source: fc.integer({ min: 0, max: 2 }) });
  fc.assert(
    fc.property(fc.array(row, { minLength: 2, maxLength: 12 }), (rows) => {
      const points = {
        ...plainPoints(
          rows.map((one) => one.T),
          rows.map((one) => one.y),
          rows.map(({ source }) => source),
        ),
        lnU: Float64Array.from(rows, (one) => one.u),
        sharedLnU: Float64Array.from(rows, ({ shared }) => shared),
      };
      const fit = fitted(points, 3, ["north", "north", ""]);
      for (const { n, compared, offset, low, high, influence } of standingsOf(fit)) {
        expect(n).toBeLessThanOrEqual(rows.length);
        if (compared === 0) expect([offset, low, high]).toEqual([Number.NaN, Number.NaN, Number.NaN]);
        else expect([low < offset, offset < high, Number.isFinite(low)]).toEqual([true, true, true]);
        expect(Number.isNaN(influence) || (influence >= 0 && influence < Infinity)).toBe(true);
      }
    }),
    { numRuns: 300 },
  );
});

describe("sources that disagree without a majority", () => {
  const fit = fitted(pointsOf({ source: 0, celsius: TEN }, { source: 1, celsius: FIVE, shift: Math.log(2) }), 2);

  test("have no curve but each its reading, which is that of its points alone", () => {
    expect(fit.curves).toEqual([]);
    expect(fit.campReadings?.map(({ sources }) => [...sources]).sort()).toEqual([[0], [1]]);
    for (const { sources, curve } of fit.campReadings ?? []) {
      expect(curve?.nSources).toBe(1);
      expect(curve?.evaluate(303.15)).toBeCloseTo(lineAt(30) + (sources[0] === 1 ? Math.log(2) : 0), 1);
    }
  });

  test("have offsets from each other, and no influence on a curve that is not there", () => {
    const standings = standingsOf(fit);
    expect(standings.map(({ offset }) => Math.round(10 * offset))).toEqual([-7, 7]);
    for (const { influence } of standings) expect(influence).toBeNaN();
  });
});
