import { determinant, inverse, Matrix } from "ml-matrix";
import { expect, test } from "vitest";
import { fitWorkspace } from "../../pipeline/fit/fit-workspace.ts";
import { generalisedLeastSquares, leaveOneOut, withinPart } from "../../pipeline/fit/generalised-least-squares.ts";
import { inverseDiagonal, logDeterminant, setRandomIntercept, whiten } from "../../pipeline/fit/random-intercept.ts";

const n = 7;
const block = [0, 0, 0, 1, 1, 2, 2];
const variance = Float64Array.of(4e-4, 9e-4, 4e-4, 1e-4, 2e-4, 1e-3, 5e-4);
const tau2 = 9e-4;
const u = [-0.08, -0.01, 0.06, -0.05, 0.02, 0, 0.07];
const y = Float64Array.of(-4.1, -4.6, -5.3, -4.25, -4.9, -4.8, -5.4);

/** The workspace with the seven points and a straight line in u. */
function loaded() {
  const ws = fitWorkspace(n);
  block.forEach((b, i) => {
    ws.block[i] = b;
    (ws.columns[0] as Float64Array)[i] = 1;
    (ws.columns[1] as Float64Array)[i] = u[i] as number;
  });
  setRandomIntercept(ws.common, n, 3, variance, 1, tau2);
  return ws;
}

const K = new Matrix(
  block.map((a, i) => block.map((b, j) => (a === b ? tau2 : 0) + (i === j ? (variance[i] as number) : 0))),
);
const F = new Matrix(u.map((value) => [1, value]));
const Y = Matrix.columnVector(Array.from(y));
const inverseK = inverse(K);
const C = inverse(F.transpose().mmul(inverseK).mmul(F));
const b = C.mmul(F.transpose()).mmul(inverseK).mmul(Y);

test("Determinant, inverse and whitening of the random-intercept covariance agree with the explicit matrix", () => {
  const ws = loaded();
  expect(logDeterminant(ws.common)).toBeCloseTo(Math.log(determinant(K)), 9);
  for (let i = 0; i < n; i++) expect(inverseDiagonal(ws.common, i) / inverseK.get(i, i)).toBeCloseTo(1, 12);
  // The whitened vector's length is y' K^-1 y.
  const out = new Float64Array(n);
  whiten(ws.common, y, out, 0, 1);
  const length = out.reduce((sum, value) => sum + value * value, 0);
  expect(length / Y.transpose().mmul(inverseK).mmul(Y).get(0, 0)).toBeCloseTo(1, 12);
});

test("Coefficients, covariance and residual sum of squares equal those of the matrix formula", () => {
  const ws = loaded();
  const fit = generalisedLeastSquares(ws, ws.common, y, 2, Number.POSITIVE_INFINITY);
  if (fit === undefined) throw new Error("no fit");
  expect(fit.coefficients[0]).toBeCloseTo(b.get(0, 0), 10);
  expect(fit.coefficients[1]).toBeCloseTo(b.get(1, 0), 9);
  for (let i = 0; i < 2; i++)
    for (let j = 0; j < 2; j++) expect((fit.covariance[2 * i + j] as number) / C.get(i, j)).toBeCloseTo(1, 9);
  const r = Matrix.sub(Y, F.mmul(b));
  expect(fit.residualSumOfSquares / r.transpose().mmul(inverseK).mmul(r).get(0, 0)).toBeCloseTo(1, 9);
});

test("The closed leave-one-out residual equals that of seven refits", () => {
  const ws = loaded();
  const fit = generalisedLeastSquares(ws, ws.common, y, 2, Number.POSITIVE_INFINITY);
  const closed = leaveOneOut(ws, ws.common, fit?.covariance ?? [], 2);
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const rest = Array.from({ length: n }, (_, j) => j).filter((j) => j !== i);
    const Ki = inverse(K.selection(rest, rest));
    const Fi = F.selection(rest, [0, 1]);
    const Yi = Y.selection(rest, [0]);
    const Ci = inverse(Fi.transpose().mmul(Ki).mmul(Fi));
    const bi = Ci.mmul(Fi.transpose()).mmul(Ki).mmul(Yi);
    // What the other points of its own source say of a point's offset belongs to its prediction.
    const k = K.selection([i], rest);
    const predicted =
      F.selection([i], [0, 1]).mmul(bi).get(0, 0) +
      k
        .mmul(Ki)
        .mmul(Matrix.sub(Yi, Fi.mmul(bi)))
        .get(0, 0);
    sum += ((y[i] as number) - predicted) ** 2;
  }
  expect(closed / Math.sqrt(sum / n)).toBeCloseTo(1, 8);
});

test("The part of the covariance from within sources leaves C F' K^-1 (tau^2 J) K^-1 F C for the offsets", () => {
  const ws = loaded();
  const fit = generalisedLeastSquares(ws, ws.common, y, 2, Number.POSITIVE_INFINITY);
  const within = withinPart(ws, ws.common, fit?.covariance ?? [], 2);
  const J = new Matrix(block.map((a) => block.map((c) => (a === c ? tau2 : 0))));
  const G = C.mmul(F.transpose()).mmul(inverseK);
  const between = G.mmul(J).mmul(G.transpose());
  for (let i = 0; i < 2; i++)
    for (let j = 0; j < 2; j++) expect(C.get(i, j) - (within[2 * i + j] as number)).toBeCloseTo(between.get(i, j), 12);
});

test("Knowing the last coefficient counts as one more observation of it", () => {
  const ws = loaded();
  const sd = 0.5;
  const fit = generalisedLeastSquares(ws, ws.common, y, 2, sd);
  const information = inverse(C);
  information.set(1, 1, information.get(1, 1) + sd ** -2);
  const posterior = inverse(information).mmul(F.transpose()).mmul(inverseK).mmul(Y);
  expect(fit?.coefficients[1]).toBeCloseTo(posterior.get(1, 0), 9);
});
