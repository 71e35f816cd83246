import { expect, test } from "vitest";
import { type Score, scoreWorld } from "../benchmarks/faults-score.ts";
import { makeWorld, USUAL } from "../benchmarks/faults-world.ts";

/**
 * A quick run of the fault benchmark: two invented worlds of 150 systems. The limits lie below the figures of the full
 * run by what two seeds can scatter.
 */
test("of known faults in invented worlds nearly all are found, nearly no clean row is flagged, causes are mostly right", () => {
  const score: Score = new Map();
  for (const seed of [11, 12]) scoreWorld(makeWorld({ ...USUAL, seed }), score);
  const share = (name: string) => {
    const { hits, cases } = score.get(name)!;
    expect(cases, name).toBeGreaterThan(5);
    return hits / cases;
  };
  expect(share("recall, points")).toBeGreaterThan(0.95);
  expect(share("recall, blocks")).toBeGreaterThan(0.9);
  expect(share("two-source conflicts reported")).toBeGreaterThan(0.8);
  expect(share("false flags, clean rows")).toBeLessThan(0.004);
  expect(share("false flags, transition rows")).toBeLessThan(0.03);
  expect(share("cause right")).toBeGreaterThan(0.8);
  expect(share("cause given to random faults")).toBeLessThan(0.3);
  expect(share("clean rows given a cause")).toBeLessThan(0.002);
  expect(share("proposed value within 5 %")).toBeGreaterThan(0.85);
});
