import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type RobustSystem, robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import { seededRandom } from "../../pipeline/numerics/random.ts";
import type { RobustFit } from "../../pipeline/records/fits.ts";
import type { SystemPoints } from "../../pipeline/records/systems.ts";
import { lineAt, pointsOf, reordered } from "./robust-support.ts";

const organic: RobustSystem = { aqueousSalt: false };

function fitOf(points: SystemPoints, about = organic, nSources = 5): RobustFit {
  return robustFits([points], [about], nSources).fits[0]!;
}

const z = (fit: RobustFit, i: number) => fit.deviation[i]! / fit.deviationSd[i]!;
const WARM = [10, 20, 30, 40, 50];

describe("the robust fit of one system", () => {
  test("keeps every point of sources that agree", () => {
    const fit = fitOf(pointsOf({ source: 0, celsius: WARM }, { source: 1, celsius: WARM, shift: 0.03 }));
    expect(fit.agreement).toBe("agreed");
    expect([...fit.kept]).toEqual(Array(10).fill(1));
    expect(fit.soundSources).toEqual([0, 1]);
    for (let i = 0; i < 10; i++) expect(Math.abs(z(fit, i))).toBeLessThan(3);
  });

  test("leaves a decimal slip out and predicts what should stand there", () => {
    const slip = { 2: -Math.LN10 };
    const fit = fitOf(pointsOf({ source: 0, celsius: WARM, faults: slip }, { source: 1, celsius: WARM }));
    expect([...fit.kept]).toEqual([1, 1, 0, 1, 1, 1, 1, 1, 1, 1]);
    expect(fit.predicted[2]).toBeCloseTo(lineAt(30), 1);
    expect(z(fit, 2)).toBeLessThan(-30);
  });

  test("does not let ten points of one bad source outvote two good ones of five", () => {
    const ten = [5, 10, 15, 20, 25, 30, 35, 40, 45, 50];
    const fit = fitOf(
      pointsOf({ source: 0, celsius: WARM }, { source: 1, celsius: ten, shift: 0.4 }, { source: 2, celsius: WARM }),
    );
    expect(fit.agreement).toBe("agreed");
    expect(fit.soundSources).toEqual([0, 2]);
    expect(fit.apartSources).toEqual([1]);
    expect(fit.predicted[5]).toBeCloseTo(lineAt(5), 1);
    expect(fit.deviation[9]).toBeCloseTo(0.4, 1);
  });

  test("calls two sources that disagree a conflict and sets nothing aside", () => {
    const fit = fitOf(pointsOf({ source: 0, celsius: WARM }, { source: 3, celsius: WARM, shift: -0.5 }));
    expect(fit.agreement).toBe("conflict");
    // Camps of equal size: the lower first.
    expect(fit.camps).toEqual([[3], [0]]);
    expect([...fit.kept]).toEqual(Array(10).fill(1));
  });

  test("calls two against two a conflict: the largest group must be more than half", () => {
    const fit = fitOf(
      pointsOf(
        { source: 0, celsius: WARM },
        { source: 1, celsius: WARM, shift: 0.02 },
        { source: 2, celsius: WARM, shift: 0.6 },
        { source: 3, celsius: WARM, shift: 0.62 },
      ),
    );
    expect(fit.agreement).toBe("conflict");
    expect(fit.camps).toEqual([
      [0, 1],
      [2, 3],
    ]);
  });

  test("takes a source with another slope for apart although it agrees in the middle", () => {
    const tilted = { 0: 0.4, 1: 0.2, 3: -0.2, 4: -0.4 };
    const fit = fitOf(
      pointsOf(
        { source: 0, celsius: WARM },
        { source: 1, celsius: WARM, faults: tilted },
        { source: 2, celsius: WARM },
      ),
    );
    expect(fit.apartSources).toEqual([1]);
  });

  test("cannot tell with three points of one source", () => {
    expect(fitOf(pointsOf({ source: 0, celsius: [20, 30, 40] })).agreement).toBe("cannot tell");
  });

  test("finds the consensus of sources at one temperature", () => {
    const fit = fitOf(
      pointsOf(
        { source: 0, celsius: [25] },
        { source: 1, celsius: [25], shift: 0.02 },
        { source: 2, celsius: [25], shift: 0.9 },
      ),
    );
    expect(fit.soundSources).toEqual([0, 1]);
    expect(fit.apartSources).toEqual([2]);
    expect(fit.deviation[2]).toBeGreaterThan(0.8);
  });

  test("protects the points beyond a transition, where d ln x/dT falls, in both of two sources", () => {
    const cold = [0, 5, 10, 15, 20, 25, 30];
    const hot = [35, 40, 45, 50, 60, 70];
    // Beyond 32 °C the solubility of this invented hydrate former stays level while the line goes on rising.
    const bend = Object.fromEntries(hot.map((t, i) => [cold.length + i, lineAt(32) - lineAt(t)]));
    const celsius = [...cold, ...hot];
    const fit = fitOf(pointsOf({ source: 0, celsius, faults: bend }, { source: 1, celsius, faults: bend }), {
      aqueousSalt: true,
      water: true,
    });
    expect([...fit.kept]).toEqual(Array(26).fill(1));
    expect(fit.breakTemperatureK).toBeGreaterThan(303);
    expect(fit.breakTemperatureK).toBeLessThan(309);
  });

  test("gives excluded points a deviation but no say", () => {
    const points = pointsOf({ source: 0, celsius: [...WARM, 150], faults: { 5: 2 } });
    const fit = fitOf(points, { aqueousSalt: false, excluded: Uint8Array.of(0, 0, 0, 0, 0, 1) });
    expect(fit.kept[5]).toBe(0);
    expect(fit.deviation[5]).toBeGreaterThan(1);
    for (let i = 0; i < 5; i++) expect(Math.abs(z(fit, i))).toBeLessThan(3);
  });

  test("takes no harm from a point that is no finite number", () => {
    const points = pointsOf({ source: 0, celsius: WARM }, { source: 1, celsius: WARM });
    points.lnValue[3] = Number.NaN;
    const fit = fitOf(points);
    expect(fit.kept[3]).toBe(0);
    expect(fit.deviation[3]).toBeNaN();
    expect(Math.abs(z(fit, 4))).toBeLessThan(3);
  });

  test("does not depend on the order of the points, but for rounding", () => {
    const points = pointsOf(
      { source: 0, celsius: WARM, faults: { 1: 0.7 } },
      { source: 1, celsius: WARM, shift: 0.05 },
      { source: 2, celsius: WARM, shift: -0.5 },
    );
    const straight = fitOf(points);
    fc.assert(
      fc.property(fc.shuffledSubarray([...Array(15).keys()], { minLength: 15, maxLength: 15 }), (order) => {
        const fit = fitOf(reordered(points, order));
        order.forEach((from, to) => {
          expect(fit.kept[to]).toBe(straight.kept[from]);
          expect(fit.deviation[to]).toBeCloseTo(straight.deviation[from]!, 9);
          expect(fit.deviationSd[to]).toBeCloseTo(straight.deviationSd[from]!, 9);
        });
        expect(fit.soundSources).toEqual(straight.soundSources);
      }),
      { numRuns: 20 },
    );
  });

  test("moves its predictions with the unit of the value and changes nothing else", () => {
    const points = pointsOf({ source: 0, celsius: WARM, faults: { 1: 0.7 } }, { source: 1, celsius: WARM });
    const before = fitOf(points);
    for (let i = 0; i < points.n; i++) points.lnValue[i]! += Math.log(1000);
    const after = fitOf(points);
    expect([...after.kept]).toEqual([...before.kept]);
    for (let i = 0; i < points.n; i++) {
      expect(after.deviation[i]).toBeCloseTo(before.deviation[i]!, 9);
      expect(after.predicted[i]! - before.predicted[i]!).toBeCloseTo(Math.log(1000), 9);
    }
  });
});

describe("the scales pooled over an edition", () => {
  /** Invented systems on lines of their own, with the given scatter within four sources and between them. */
  function edition(within: readonly number[], between: number): SystemPoints[] {
    const random = seededRandom(7);
    return Array.from({ length: 120 }, () => {
      const series = within.map((sd, source) => ({
        source,
        celsius: WARM,
        shift: between * random.normal(),
        faults: Object.fromEntries(WARM.map((_, i) => [i, sd * random.normal()])),
      }));
      const points = pointsOf(...series);
      points.lnValue.forEach((_, i) => {
        points.lnValue[i] = lineAt(points.temperatureK[i]! - 273.15) + series[points.source[i]!]!.shift;
        points.lnValue[i]! += series[points.source[i]!]!.faults[i % 5]!;
      });
      return points;
    });
  }

  test("recover the scatter within every source and between sources to 15 %", () => {
    const within = [0.01, 0.015, 0.02, 0.03];
    const systems = edition(within, 0.05);
    const { scales } = robustFits(
      systems,
      systems.map(() => organic),
      4,
    );
    within.forEach((sd, source) => {
      expect(Math.abs(scales.within[source]! / sd - 1)).toBeLessThan(0.15);
    });
    expect(Math.abs(scales.between / 0.05 - 1)).toBeLessThan(0.15);
    expect(scales.betweenDegreesOfFreedom).toBeGreaterThan(200);
    expect(scales.betweenAqueousSaltDegreesOfFreedom).toBe(0);
  });

  test("keep the default between-source scatter until three sources can estimate it", () => {
    const systems = [pointsOf({ source: 0, celsius: WARM }, { source: 1, celsius: WARM })];
    const { scales } = robustFits(systems, [organic], 2);
    expect(scales.between).toBe(0.04);
    expect(scales.betweenAqueousSalt).toBe(0.01);
    expect(scales.betweenDegreesOfFreedom).toBe(0);
  });

  test("exist for an edition without systems", () => {
    expect(robustFits([], [], 0).fits).toEqual([]);
  });
});
