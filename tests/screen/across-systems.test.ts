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
