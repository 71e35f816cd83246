import { describe, expect, test } from "vitest";
import { voteBySource } from "../../pipeline/fit/robust/source-vote.ts";

const sure = new Float64Array(5).fill(1e-6);
const vote = (...location: number[]) => voteBySource([...location.keys()], Float64Array.from(location), sure, 0.18);

describe("the vote by source", () => {
  test("finds the sources that agree within the tolerance", () => {
    expect(vote(0, 0.1, 0.9)).toEqual({ majority: true, camps: [[0, 1], [2]] });
  });

  test("has no majority in one against one, nor in two against one and one", () => {
    expect(vote(0, 0.5).majority).toBe(false);
    expect(vote(0, 0.05, 0.5, 1).majority).toBe(false);
  });

  test("does not chain sources that agree pair by pair but not together", () => {
    expect(vote(0, 0.15, 0.3)).toEqual({ majority: true, camps: [[0, 1], [2]] });
  });

  test("gives sources that do not know their own location the benefit of the doubt", () => {
    const unsure = Float64Array.of(0.01, 0.01);
    expect(voteBySource([0, 1], Float64Array.of(0, 0.3), unsure, 0.18).majority).toBe(true);
  });

  test("takes one source for its own majority", () => {
    expect(vote(3)).toEqual({ majority: true, camps: [[0]] });
  });
});
