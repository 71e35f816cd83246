import { describe, expect, test } from "vitest";
import { type Reading, screened } from "./support.ts";

const SCATTER = [1.008, 0.994, 1.004, 0.99];
/** 1000 x of a curve whose slope falls at `breakC`, from 0.045 to 0.01 per K near room temperature. */
const read = (celsius: readonly number[], turn: number, breakC: number): Reading[] =>
  celsius.map((t, i) => {
    const u = (T: number) => 298.15 * (1 - 298.15 / (T + 273.15));
    const below = u(Math.min(t, breakC));
    const x = Math.exp(-4 + 0.045 * below + 0.01 * (u(t) - below));
    return [t, Number((1000 * x * SCATTER[(i + turn) % 4]!).toPrecision(4))];
  });

describe("a change of the solid in a system of few temperatures a source", () => {
  const sources = {
    ...{ a: read([6, 20, 34], 0, 32), b: read([9, 30, 55], 1, 32) },
    ...{ c: read([12, 44, 58], 2, 32), d: read([8, 26, 50], 3, 32) },
  };

  test("makes no row off, and is told as what cannot be excluded", () => {
    const flags = screened([sources]);
    expect(flags).toMatchObject([{ code: "possible-transition", scope: "system", severity: "notice" }]);
    expect(flags[0]!.evidence).toContain("a change of the solid near 32.0 °C would bring 12 values");
  });

  test("excuses no slip: a value ten times too high is still off", () => {
    const slip = sources.c.map(([t, x], i): Reading => [t, i === 1 ? 10 * x : x]);
    const blocking = screened([{ ...sources, c: slip }]).filter(({ severity }) => severity === "blocking");
    expect(blocking).toMatchObject([{ scope: "measurement", suspectedCause: "power of ten" }]);
  });

  test("excuses no source that is off as a whole", () => {
    const low = sources.c.map(([t, x]): Reading => [t, Number((0.6 * x).toPrecision(4))]);
    const flags = screened([{ ...sources, c: low }]).filter(({ severity }) => severity === "blocking");
    expect(flags).toMatchObject([{ scope: "block", source: 2 }]);
  });
});
