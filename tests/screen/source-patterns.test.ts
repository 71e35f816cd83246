import { describe, expect, test } from "vitest";
import { type Reading, type Sources, screened } from "./support.ts";

const WARM = [5, 14, 23, 32, 41, 50];
const SCATTER = [1.01, 0.99, 1.004, 1.012, 0.991, 0.996];
const SOLUTES = ["p", "q", "r", "s", "t"];

/** 1000 x of a curve whose slope at 25 °C is `slope` (1/K), read `off` K beside the temperature it is given for. */
function read(slope: number, celsius: readonly number[], turn: number, off: (t: number) => number): Reading[] {
  return celsius.map((t, i) => {
    const x = Math.exp(-4 + slope * 298.15 * (1 - 298.15 / (t + off(t) + 273.15)));
    return [t, Number((1000 * x * SCATTER[(i + turn) % 6]!).toPrecision(4))];
  });
}

const systems = (off: (t: number) => number): Sources[] =>
  [0.015, 0.03, 0.045, 0.06, 0.038].map((slope, s) => ({
    a: read(slope, WARM, s, off),
    ...{ b: read(slope, [7, 16, 27, 38, 49], s + 1, () => 0), c: read(slope, [4, 18, 30, 40, 52], s + 2, () => 0) },
    d: read(slope, [6, 20, 29, 37, 51], s + 3, () => 0),
  }));

describe("a source whose every series shows one pattern", () => {
  test("of a jacket that lags is told once, with the series that it moves", () => {
    const flags = screened(
      systems((t) => -0.15 * (t - 23)),
      { solutes: SOLUTES },
    );
    const ofSource = flags.filter(({ scope }) => scope === "source");
    expect(ofSource).toMatchObject([
      { code: "source-off-throughout", severity: "notice", source: 0, suspectedCause: "temperature offset" },
    ]);
    expect(ofSource[0]!.evidence).toMatch(/temperatures off from room, by 0\.1\d+ K per K: seen in 5 of 5 systems/);
    // The flattest curve is moved by 6 % at most, below the material threshold.
    const moved = flags.filter(
      ({ scope, source, severity }) => scope === "block" && source === 0 && severity === "blocking",
    );
    expect(moved.map(({ system }) => system).sort()).toEqual([1, 2, 3, 4]);
    for (const flag of moved) expect(flag.suspectedCause).toBe("temperature offset");
  });

  test("of a thermometer off by a constant is told with how far", () => {
    const flags = screened(
      systems(() => -5),
      { solutes: SOLUTES },
    );
    const told = flags.find(({ code }) => code === "source-off-throughout");
    expect(told?.evidence).toMatch(/temperatures off by a constant, by (4\.[5-9]|5\.[0-5])\d* K/);
  });

  test("is not seen where the source is sound, nor where one series of five is off", () => {
    const one = systems(() => 0);
    one[2] = systems(() => -8)[2]!;
    for (const world of [systems(() => 0), one]) {
      const flags = screened(world, { solutes: SOLUTES });
      expect(flags.filter(({ code }) => code === "source-off-throughout")).toEqual([]);
    }
  });
});
