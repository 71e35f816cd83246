import { describe, expect, test } from "vitest";
import { screened, series } from "./support.ts";

const WARM = [10, 20, 30, 40, 50];
const times = (factor: number) => series(WARM, (value) => Number((factor * value).toPrecision(4)));
const good = { b: series([12, 22, 32, 42, 52], (value) => 1.02 * value), c: series([11, 21, 31, 41, 51]) };

describe("off blocks of one source side by side", () => {
  test("with the same ratio in two solvents of one solute had another solid form", () => {
    const flags = screened([
      { a: times(1.6), ...good },
      { a: times(1.63), ...good },
    ]);
    expect(flags).toMatchObject([
      { scope: "block", suspectedCause: "another solid form", causeDetail: "the same ratio in 2 solvents: 1.59, 1.62" },
      { scope: "block", suspectedCause: "another solid form" },
    ]);
  });

  test("with one ratio that shrinks on heating had another solid form, not a thermometer that is off", () => {
    const shrinking = (at25: number) =>
      series(WARM, (value, i) => Number((value * Math.exp(at25 * (1 - 0.006 * (WARM[i]! - 25)))).toPrecision(4)));
    const flags = screened([
      { a: shrinking(0.5), ...good },
      { a: shrinking(0.52), ...good },
      { a: shrinking(0.49), ...good },
    ]);
    expect(flags).toHaveLength(3);
    for (const flag of flags) expect(flag).toMatchObject({ scope: "block", suspectedCause: "another solid form" });
  });

  test("that are lower by one ratio stay a possible more stable form, with the form named besides", () => {
    const flags = screened([
      { a: times(0.62), ...good },
      { a: times(0.61), ...good },
    ]);
    for (const flag of flags)
      expect(flag).toMatchObject({ code: "possible-more-stable-form", suspectedCause: "another solid form" });
    expect(flags).toHaveLength(2);
  });

  test("that are lower by a factor of a dilution stay a possible more stable form too", () => {
    const [flag] = screened([{ a: times(0.2), ...good }]);
    expect(flag).toMatchObject({ code: "possible-more-stable-form", severity: "blocking" });
    expect(flag!.lookAt).toContain("more stable form");
  });

  test("with one factor for every solute and solvent have no simple cause: a calibration, no form and no bottle", () => {
    const more = { solutes: ["p", "p", "q", "q"], solvents: ["ethanol", "toluene", "ethanol", "toluene"] };
    const flags = screened(
      [1.5, 1.51, 1.49, 1.5].map((factor) => ({ a: times(factor), ...good })),
      more,
    );
    // Four series, and once the source that they have in common.
    expect(flags.map(({ scope }) => scope).sort()).toEqual(["block", "block", "block", "block", "source"]);
    for (const { suspectedCause } of flags) expect(suspectedCause).toBe("no simple cause");
  });

  test("that one error of temperature explains, though they differ in slope, had one thermometer", () => {
    const WIDE = [6, 15, 24, 33, 42, 51];
    const at = (slope: number, celsius: number) =>
      Number((1000 * Math.exp(-4 + slope * 298.15 * (1 - 298.15 / (celsius + 273.15)))).toPrecision(4));
    const of = (slope: number, off: number) => WIDE.map((t) => [t, at(slope, t + off)] as const);
    const system = (slope: number) => ({ a: of(slope, 8), b: of(slope, 0.1), c: of(slope, -0.1), d: of(slope, 0) });
    const more = { solutes: ["p", "q", "r"], solvents: ["ethanol", "toluene", "water"] };
    const all = screened([system(0.025), system(0.04), system(0.055)], more);
    // Values without scatter raise notices of their own.
    const flags = all.filter(({ severity }) => severity === "blocking");
    expect(flags).toHaveLength(3);
    for (const flag of flags) expect(flag).toMatchObject({ source: 0, suspectedCause: "temperature offset" });
    expect(flags[0]!.causeDetail).toContain("in 3 systems");
  });

  test("with different ratios, or in one solvent only, have no simple cause", () => {
    for (const systems of [[times(1.6)], [times(1.6), times(0.7)]]) {
      const flags = screened(systems.map((a) => ({ a, ...good })));
      expect(flags.map(({ suspectedCause }) => suspectedCause)).toEqual(systems.map(() => "no simple cause"));
    }
  });

  test("with all its solutes off in one organic solvent and none in another had a wet solvent", () => {
    const more = { solutes: ["p", "q", "p", "q"], solvents: ["ethanol", "ethanol", "toluene", "toluene"] };
    const flags = screened(
      [
        { a: times(1.35), ...good },
        { a: times(1.65), ...good },
        { a: times(1.01), ...good },
        { a: times(0.99), ...good },
      ],
      more,
    );
    expect(flags).toMatchObject([
      { system: 0, suspectedCause: "wet solvent" },
      { system: 1, suspectedCause: "wet solvent" },
    ]);
  });

  test("in water hold no water", () => {
    const more = { solutes: ["p", "q"], solvents: ["water", "water"] };
    const flags = screened(
      [times(1.35), times(1.65)].map((a) => ({ a, ...good })),
      more,
    );
    for (const { suspectedCause } of flags) expect(suspectedCause).toBe("no simple cause");
  });
});

describe("a proportion of a mixture", () => {
  test("taken from the next column is a composition mix-up", () => {
    const at = (factor: number) => ({
      a: times(factor),
      b: series([12, 22, 32, 42, 52], (value) => 1.02 * factor * value),
      c: series([11, 21, 31, 41, 51], (value) => factor * value),
    });
    const [first, second] = [at(1), at(2.3)];
    const swapped = first.a.map(([t, value], i) => [t, i === 2 ? second.a[2]![1] : value] as const);
    const flags = screened([{ ...first, a: swapped }, second], { mixtures: true });
    expect(flags).toMatchObject([
      { row: 2, suspectedCause: "composition mix-up", causeDetail: "value of solvent 1 + solvent 2, 2" },
    ]);
  });
});
