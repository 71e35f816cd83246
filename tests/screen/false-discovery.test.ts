import { describe, expect, test } from "vitest";
import { rejectionLimit } from "../../pipeline/screen/false-discovery.ts";

describe("the procedure of Benjamini and Hochberg", () => {
  // Y. Benjamini, Y. Hochberg, J. R. Stat. Soc. B 57 (1995) 289-300, section 3.2: fifteen p-values of a clinical trial.
  const published = [
    ...[0.0001, 0.0004, 0.0019, 0.0095, 0.0201, 0.0278, 0.0298, 0.0344, 0.0459],
    ...[0.324, 0.4262, 0.5719, 0.6528, 0.759, 1],
  ];

  test("rejects the four smallest of the published example at 0.05", () => {
    expect(rejectionLimit(published, 15, 0.05)).toBe(0.0095);
  });

  test("gives the same limit where the large p-values are only counted", () => {
    expect(rejectionLimit(published.slice(0, 6), 15, 0.05)).toBe(0.0095);
  });

  test("rejects a p-value that only a larger one saves", () => {
    expect(rejectionLimit([0.04, 0.05], 2, 0.05)).toBe(0.05);
  });

  test("rejects nothing among none", () => {
    expect(rejectionLimit([], 0, 0.05)).toBe(-1);
  });
});
