import { describe, expect, test } from "vitest";
import { sharedDeviation } from "../../pipeline/fit/robust/lack-of-fit.ts";
import type { RobustWorkspace } from "../../pipeline/fit/robust/robust-workspace.ts";

/** A workspace of one point by each of two sound sources: temperature (K) and deviation (ln value), standard deviation 0.03. */
function twoPoints(own: readonly [number, number], other: readonly [number, number]): RobustWorkspace {
  const only = {
    groups: 2,
    sound: Uint8Array.of(1, 1),
    usable: Uint8Array.of(1, 1),
    groupStart: Int32Array.of(0, 1, 2),
    temperatureK: Float64Array.of(own[0], other[0]),
    deviation: Float64Array.of(own[1], other[1]),
    deviationVariance: Float64Array.of(0.0009, 0.0009),
    rows: { group: Int32Array.of(0, 1) },
  };
  return only as unknown as RobustWorkspace;
}

describe("a deviation that another source shares", () => {
  test("speaks against the curve, by the smaller of the two", () => {
    expect(sharedDeviation(twoPoints([300, 0.3], [302, 0.25]), 0)).toBe(0.25);
    expect(sharedDeviation(twoPoints([300, -0.3], [310, -0.2]), 0)).toBe(0.2);
  });

  test("excuses no more than a factor 2, even beside a slip of like size in the other source", () => {
    expect(sharedDeviation(twoPoints([300, 2.3], [301, 2.28]), 0)).toBe(0);
    expect(sharedDeviation(twoPoints([300, 0.72], [300, 0.7]), 0)).toBe(0);
  });

  test("must be the same within uncertainty and distance", () => {
    expect(sharedDeviation(twoPoints([300, 0.2], [300, 0.6]), 0)).toBe(0);
    expect(sharedDeviation(twoPoints([300, 0.2], [314, 0.6]), 0)).toBe(0.6);
  });

  test("is none where the other deviates to the other side or is too far away", () => {
    expect(sharedDeviation(twoPoints([300, 0.3], [302, -0.3]), 0)).toBe(0);
    expect(sharedDeviation(twoPoints([300, 0.3], [320, 0.3]), 0)).toBe(0);
  });
});
