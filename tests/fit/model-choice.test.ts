import { expect, test } from "vitest";
import type { Candidate } from "../../pipeline/fit/candidate.ts";
import { chooseModel } from "../../pipeline/fit/model-choice.ts";
import { physicalVeto } from "../../pipeline/fit/physical-veto.ts";
import { lackOfCurvature } from "../../pipeline/fit/robust/lack-of-curvature.ts";
import { curveThrough, expectCurve, plainPoints } from "./plain-system.ts";

function candidate(model: Candidate["model"], parameterCount: number, aicc: number, leaveOneOut: number): Candidate {
  return {
    ...{ model, parameterCount, aicc, leaveOneOut, residualSumOfSquares: 1 },
    lnValue: () => -3,
    slope: () => 0.01,
    standardErrorOfRise: () => 0,
    published: () => ({ names: [], values: [], covariance: [] }),
  };
}

const none = () => undefined;
const line = candidate("van 't Hoff", 2, -50, 0.02);
const bent = candidate("modified Apelblat", 3, -53, 0.019);
const close = candidate("quadratic in 1/T", 3, -52.5, 0.015);

test("The smallest AICc wins, and the others say by how much they miss it", () => {
  const { chosen, runnersUp } = chooseModel([line, bent], none);
  expect(chosen?.model).toBe("modified Apelblat");
  expect(runnersUp).toEqual([{ model: "van 't Hoff", aicc: -50, leaveOneOut: 0.02, why: "AICc 3.0 above the best" }]);
});

test("Models within 2 units of AICc are told apart by the leave-one-out residual", () => {
  const { chosen, runnersUp } = chooseModel([line, bent, close], none);
  expect(chosen?.model).toBe("quadratic in 1/T");
  expect(runnersUp[1]?.why).toBe("leave-one-out residual 1.90 % against 1.50 %, AICc within 2 of the best");
});

test("Where nothing tells two models apart the simpler one stands", () => {
  const equal = candidate("modified Apelblat", 3, -50, 0.02);
  expect(chooseModel([line, equal], none).chosen?.model).toBe("van 't Hoff");
});

test("A physically impossible model is passed over whatever its AICc, and its reason is kept", () => {
  const { chosen, runnersUp } = chooseModel([line, bent], (c) => (c === bent ? "passes x = 1" : undefined));
  expect(chosen).toBe(line);
  expect(runnersUp[0]?.why).toBe("passes x = 1");
  expect(chooseModel([line], () => "impossible").chosen).toBeUndefined();
});

test("With too few points for AICc the fewest coefficients are taken", () => {
  const [a, b] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const { chosen, runnersUp } = chooseModel(
    [candidate("van 't Hoff", 2, a, 0.03), candidate("modified Apelblat", 3, b, 0.01)],
    none,
  );
  expect(chosen?.model).toBe("van 't Hoff");
  expect(runnersUp[0]?.why).toBe("too few points for its coefficients: AICc is not defined");
  expect(runnersUp[0]?.aicc).toBeNaN();
});

const range = {
  ...{ n: 9, sources: [0], perLaboratory: [1], sharedVariance: [0] },
  ...{ distinctTemperatures: 9, lowK: 280, highK: 330, centreK: 304, unusable: 0 },
};

test("A turn inside the data is passed over where the scatter explains it and believed where it does not", () => {
  const turning: Candidate = {
    ...bent,
    lnValue: (T) => -3 - 1e-5 * (T - 320) ** 2,
    slope: (T) => -2e-5 * (T - 320),
    standardErrorOfRise: () => 0.01,
  };
  expect(physicalVeto(turning, range, "ln x")).toMatch(/turns at 46.8 °C inside the data, a change of 0.1 %/);
  expect(physicalVeto({ ...turning, standardErrorOfRise: () => 0.0004 }, range, "ln x")).toBeUndefined();
});

test("A mole fraction above 1 inside the data is passed over; a mass ratio above 1 is none of that", () => {
  const high: Candidate = { ...line, lnValue: (T) => (T - 320) / 50, slope: () => 0.02 };
  expect(physicalVeto(high, range, "ln x")).toMatch(/reaches a mole fraction of 1.221, above 1/);
  expect(physicalVeto(high, range, "ln r")).toBeUndefined();
});

test("A line is passed over where the bend of the points exceeds the scatter at the 1 % level", () => {
  // t(0.995, 7) = 3.499483 (tables), its square 12.2464.
  const richer = { ...bent, residualSumOfSquares: 3 };
  expect(lackOfCurvature({ ...line, residualSumOfSquares: 15.24 }, richer, 7)).toBeUndefined();
  expect(lackOfCurvature({ ...line, residualSumOfSquares: 15.26 }, richer, 7)).toMatch(/F = 12.3 against 12.2/);
});

// L-serine in ethanol, BigSolDB 2.0 from doi 10.1021/acs.jced.9b00460 behaves like this: six points, a clear bend.
test("Six points with a bend of 6 % get a curve that follows it, although AICc alone would keep the line", () => {
  const T = [278.15, 288.15, 298.15, 308.15, 318.15, 328.15];
  const noise = [0.004, -0.006, 0.003, 0.005, -0.007, 0.002];
  const lnX = T.map((t, i) => {
    const u = 303 / t - 1;
    return -11 - 8.7 * u + 42 * (u - Math.log1p(u)) + (noise[i] as number);
  });
  const curve = expectCurve(curveThrough(plainPoints(T, lnX)));
  expect(curve.coefficients).toHaveLength(3);
  const passedOver = curve.runnersUp.find(({ model }) => model === "van 't Hoff");
  expect(passedOver?.why).toMatch(/does not follow the bend of the points/);
  expect(passedOver?.aicc).toBeLessThan(curve.aicc);
});
