import { expect, test } from "vitest";
import { type Score, scoreWorld } from "../benchmarks/faults-score.ts";
import { makeWorld, USUAL } from "../benchmarks/faults-world.ts";

/**
 * A quick run of the fault benchmark: two small invented worlds with faults enough to count. Floors lie below the figures
 * of the full run (tests/benchmarks/README.md) by what so few cases scatter; misses come in clusters, for a system whose
 * sources are in conflict hides all single faults in it.
 */
test("of known faults in invented worlds nearly all are found, nearly no clean row is flagged, causes are mostly right", () => {
  const score: Score = new Map();
  for (const seed of [11, 12]) scoreWorld(makeWorld({ ...USUAL, seed, solutes: 22, sources: [2, 4] }), score);
  const share = (name: string, least = 20) => {
    const { hits, cases } = score.get(name)!;
    expect(cases, name).toBeGreaterThanOrEqual(least);
    return hits / cases;
  };
  expect(share("recall, points")).toBeGreaterThanOrEqual(0.96);
  expect(share("recall, blocks")).toBeGreaterThanOrEqual(0.95);
  expect(share("recall, bent series")).toBeGreaterThanOrEqual(0.92);
  expect(share("two-source conflicts reported", 8)).toBeGreaterThanOrEqual(0.85);
  expect(share("false flags, clean rows", 3000)).toBeLessThanOrEqual(0.002);
  expect(share("false flags, transition rows", 300)).toBeLessThanOrEqual(0.01);
  expect(share("cause right")).toBeGreaterThanOrEqual(0.88);
  expect(share("cause given to random faults")).toBeLessThanOrEqual(0.14);
  expect(share("clean rows given a cause", 3000)).toBeLessThanOrEqual(0.001);
  expect(share("proposed value within 5 %")).toBeGreaterThanOrEqual(0.97);
});
