import { SCREENING_STRIDE, writeScreeningBasis } from "../../curves/screening-basis.ts";
import { relativeRounding } from "../../numerics/decimal-rounding.ts";
import {
  createGroupedModel,
  expected,
  fitGroupedModel,
  type GroupedModel,
  type GroupedRows,
} from "../../numerics/grouped-model.ts";
import type { Flag, RobustFit } from "../../records/fits.ts";
import { blocksOf } from "../block-screen.ts";
import { type ScreenInput, sourceName } from "../screen-input.ts";
import { counted, threeDigits } from "../wording.ts";

/** Points, and span in K, from which residuals say anything after three coefficients. */
const [LEAST_POINTS, LEAST_SPAN_K] = [7, 15];
const COEFFICIENTS = 3;
/** Residuals, times the rounding that digits alone would leave, up to which nothing but rounding is left. */
const OF_ROUNDING = 1.6;
/** No measurement scatters by less than this (ln value): digits coarser than it say nothing. Common practice. */
const LEAST_SCATTER = 0.0015;

/** The name and the question of this cause. */
export const calculatedValueCopied = {
  name: "calculated value copied",
  lookAt: "Look at whether the table gives the values of a fitted equation beside the measured ones.",
} as const;

/**
 * The column of calculated values was copied for the measured ones: the values lie on a smooth curve to the last digit.
 *
 * Computes the residuals of each block from its own curve ln s = b0 + b1 u + b2 (ln(T/T0) + u), and what rounding alone
 * would leave. A notice: the values need not be wrong, but they are no independent measurements.
 * Known limitation: values calculated in another quantity or from another equation leave more than rounding and are not
 * seen; values in few digits say nothing.
 */
export function calculatedFlags(input: ScreenInput): Flag[] {
  const capacity = input.fits.reduce((most, { points }) => Math.max(most, points.n), 1);
  const model = createGroupedModel(COEFFICIENTS, 1);
  for (let j = 0; j < COEFFICIENTS; j++) model.prior[j * COEFFICIENTS + j] = 1e-9;
  model.groups = 1;
  model.offsetVariance[0] = 1e-14;
  const rows: GroupedRows = {
    ...{ n: 0, stride: SCREENING_STRIDE, response: new Float64Array(capacity), group: new Int32Array(capacity) },
    ...{ design: new Float64Array(capacity * SCREENING_STRIDE), variance: new Float64Array(capacity).fill(1e-6) },
  };
  return input.fits.flatMap((fit) => {
    if (fit.points.n < LEAST_POINTS) return [];
    return [...blocksOf(fit)].flatMap(([source, points]): Flag[] => {
      if (!mayBeSmooth(fit, points)) return [];
      const left = rmsLeft(model, rows, fit, points);
      if (!(left < OF_ROUNDING * LEAST_SCATTER)) return [];
      const rounding = rmsRounding(input, fit, points);
      if (!(rounding < LEAST_SCATTER) || !(left < OF_ROUNDING * rounding)) return [];
      return [
        {
          scope: "block",
          code: "calculated-values",
          severity: "notice",
          source,
          system: fit.system,
          suspectedCause: calculatedValueCopied.name,
          causeDetail: "values lie on a three-parameter curve within their rounding",
          evidence:
            `the ${counted(points.length, "value")} of ${sourceName(input, source)} lie within ${threeDigits(100 * left)} % ` +
            `(root mean square) of a smooth curve; rounding to the digits given leaves ${threeDigits(100 * rounding)} % by itself`,
          lookAt: calculatedValueCopied.lookAt,
        },
      ];
    });
  });
}

function mayBeSmooth({ points: { temperatureK } }: RobustFit, points: readonly number[]): boolean {
  if (points.length < LEAST_POINTS) return false;
  const temperatures = points.map((point) => temperatureK[point]!);
  return Math.max(...temperatures) - Math.min(...temperatures) >= LEAST_SPAN_K;
}

/** Root mean square residual of a block from its own curve, corrected for its coefficients; ln value. */
function rmsLeft(model: GroupedModel, rows: GroupedRows, { points }: RobustFit, of: readonly number[]): number {
  const n = of.length;
  rows.n = n;
  let centreK = 0;
  let shift = 0;
  for (const point of of) {
    centreK += points.temperatureK[point]! / n;
    shift += points.lnValue[point]! / n;
  }
  for (const [i, point] of of.entries()) {
    writeScreeningBasis(points.temperatureK[point]!, centreK, Number.NaN, rows.design, i * SCREENING_STRIDE);
    rows.response[i] = points.lnValue[point]! - shift;
  }
  fitGroupedModel(model, rows, new Uint8Array(n).fill(1));
  let sum = 0;
  for (let i = 0; i < n; i++) sum += (rows.response[i]! - expected(model, rows.design, i * SCREENING_STRIDE)) ** 2;
  return Math.sqrt(sum / (n - COEFFICIENTS));
}

/** Root mean square of the rounding errors that the digits of a block's values leave, ln value. */
function rmsRounding({ table }: ScreenInput, { points }: RobustFit, of: readonly number[]): number {
  const squares = of.map((point) => relativeRounding(table.reportedValue[points.row[point]!]!) ** 2 / 3);
  return Math.sqrt(squares.reduce((sum, square) => sum + square, 0) / of.length);
}
