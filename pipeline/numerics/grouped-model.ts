/**
 * The linear model with a random offset per group, y = F b + offset(group) + noise, with independent Gaussian parts
 *
 *   b ~ N(0, prior^-1),  offset(g) ~ N(0, v_g),  noise_i ~ N(0, d_i),
 *
 * so that y has the covariance K = F prior^-1 F' + [same group] v_g + diag(d). K is never formed: the offsets are
 * eliminated group by group (Henderson's mixed-model equations) and what is left is one p x p matrix, at a cost of
 * O(n p^2). Results equal those from K^-1, which the tests form.
 *
 * A model is a workspace that is filled again and again: nothing is allocated by a fit.
 * @see C. R. Henderson, Biometrics 31 (1975) 423-447, doi 10.2307/2529430.
 */

/** Rows of one data set, row-major. */
export interface GroupedRows {
  n: number;
  /** F, n x stride; the first p numbers of a row are used. */
  readonly design: Float64Array;
  readonly stride: number;
  readonly response: Float64Array;
  /** d_i, variance of the noise. */
  readonly variance: Float64Array;
  /** Group of each row, 0 and up. */
  readonly group: Int32Array;
}

/** Workspace and result of a fit. Symmetric p x p matrices are stored full, row-major. */
export interface GroupedModel {
  readonly p: number;
  /** Precision of b before the data; at least weakly informative, so that every case is solvable. */
  readonly prior: Float64Array;
  /** v_g by group. */
  readonly offsetVariance: Float64Array;
  groups: number;
  /** Inverse of prior + F'WF with the offsets eliminated: the covariance of b after the data. */
  readonly covariance: Float64Array;
  readonly coefficients: Float64Array;
  readonly offsets: Float64Array;
  /** Variance of the offset given b: 1 / (1/v_g + sum of weights). */
  readonly offsetSlack: Float64Array;
  /** Weighted mean row of F in the group, shrunk towards 0 as the offset is: G x p. */
  readonly groupCentre: Float64Array;
  /** ln |covariance^-1|. */
  logDeterminant: number;
  readonly work: Float64Array;
}

/** An empty model with p coefficients and room for `capacity` groups. */
export function createGroupedModel(p: number, capacity: number): GroupedModel {
  const reals = (length: number) => new Float64Array(length);
  return {
    p,
    prior: reals(p * p),
    offsetVariance: reals(capacity),
    groups: 0,
    covariance: reals(p * p),
    coefficients: reals(p),
    offsets: reals(capacity),
    offsetSlack: reals(capacity),
    groupCentre: reals(capacity * p),
    logDeterminant: 0,
    work: reals(p * p + 2 * p + capacity),
  };
}

/**
 * Fits the rows with `use[i]` = 1. `prior`, `offsetVariance` and `groups` must be set; a group without a used row keeps
 * the offset 0 with its full variance v_g, so that predictions for it are those for a new group.
 * @throws RangeError if the prior does not make the coefficients determinate.
 */
export function fitGroupedModel(model: GroupedModel, rows: GroupedRows, use: Uint8Array): void {
  const { p, prior, offsetVariance, groups, covariance, coefficients, offsets, offsetSlack, groupCentre, work } = model;
  const { n, design, stride, response, variance, group } = rows;
  const sum = p * p;
  const weights = sum + 2 * p;
  covariance.set(prior);
  work.fill(0, sum, weights + groups);
  offsets.fill(0, 0, groups);
  groupCentre.fill(0, 0, groups * p);
  for (let i = 0; i < n; i++) {
    if (use[i] === 0) continue;
    const g = group[i]!;
    const w = 1 / variance[i]!;
    const wy = w * response[i]!;
    work[weights + g]! += w;
    offsets[g]! += wy;
    const at = i * stride;
    for (let j = 0; j < p; j++) {
      const f = design[at + j]!;
      const wf = w * f;
      groupCentre[g * p + j]! += wf;
      work[sum + j]! += wy * f;
      for (let k = 0; k <= j; k++) covariance[j * p + k]! += wf * design[at + k]!;
    }
  }
  for (let g = 0; g < groups; g++) {
    const slack = 1 / (1 / offsetVariance[g]! + work[weights + g]!);
    offsetSlack[g] = slack;
    offsets[g]! *= slack;
    for (let j = 0; j < p; j++) {
      const centre = groupCentre[g * p + j]!;
      work[sum + j]! -= centre * offsets[g]!;
      for (let k = 0; k <= j; k++) covariance[j * p + k]! -= centre * slack * groupCentre[g * p + k]!;
    }
  }
  model.logDeterminant = invertSymmetric(covariance, p, work);
  for (let j = 0; j < p; j++) {
    let b = 0;
    for (let k = 0; k < p; k++) b += covariance[j * p + k]! * work[sum + k]!;
    coefficients[j] = b;
  }
  for (let g = 0; g < groups; g++) {
    for (let j = 0; j < p; j++) {
      groupCentre[g * p + j]! *= offsetSlack[g]!;
      offsets[g]! -= groupCentre[g * p + j]! * coefficients[j]!;
    }
  }
}

/** Replaces the lower triangle of a symmetric positive definite p x p matrix by its full inverse; returns ln |A|. */
function invertSymmetric(a: Float64Array, p: number, work: Float64Array): number {
  let logDeterminant = 0;
  for (let j = 0; j < p; j++) {
    for (let k = 0; k <= j; k++) {
      let s = a[j * p + k]!;
      for (let m = 0; m < k; m++) s -= a[j * p + m]! * a[k * p + m]!;
      if (k < j) a[j * p + k] = s / a[k * p + k]!;
      else if (!(s > 0)) throw new RangeError(`Coefficient ${j + 1} of ${p} is not determined; give it a prior`);
      else {
        a[j * p + j] = Math.sqrt(s);
        logDeterminant += Math.log(s);
      }
    }
  }
  // L^-1 into work, then A^-1 = L^-T L^-1.
  for (let j = 0; j < p; j++) {
    for (let k = 0; k <= j; k++) {
      let s = j === k ? 1 : 0;
      for (let m = k; m < j; m++) s -= a[j * p + m]! * work[m * p + k]!;
      work[j * p + k] = s / a[j * p + j]!;
    }
  }
  for (let j = 0; j < p; j++) {
    for (let k = 0; k <= j; k++) {
      let s = 0;
      for (let m = j; m < p; m++) s += work[m * p + j]! * work[m * p + k]!;
      a[j * p + k] = s;
      a[k * p + j] = s;
    }
  }
  return logDeterminant;
}

/** Expected response of a row of F in the population of groups: F b. */
export function expected(model: GroupedModel, design: Float64Array, at: number): number {
  let mean = 0;
  for (let j = 0; j < model.p; j++) mean += design[at + j]! * model.coefficients[j]!;
  return mean;
}

/** Variance of F b for a row of F. */
export function expectedVariance(model: GroupedModel, design: Float64Array, at: number): number {
  const { p, covariance } = model;
  let total = 0;
  for (let j = 0; j < p; j++) {
    let s = 0;
    for (let k = 0; k < p; k++) s += covariance[j * p + k]! * design[at + k]!;
    total += s * design[at + j]!;
  }
  return total;
}

/** Variance of F b + offset(g) for a row of F and a group of the model (one without rows counts as new). */
export function groupVariance(model: GroupedModel, design: Float64Array, at: number, g: number): number {
  const { p, covariance, groupCentre, offsetSlack } = model;
  let total = offsetSlack[g]!;
  for (let j = 0; j < p; j++) {
    let s = 0;
    for (let k = 0; k < p; k++) s += covariance[j * p + k]! * (design[at + k]! - groupCentre[g * p + k]!);
    total += s * (design[at + j]! - groupCentre[g * p + j]!);
  }
  return total;
}

/**
 * Deviation of every row from what the other used rows say, and the variance of that deviation (noise included):
 * for a used row (K^-1 y)_i / (K^-1)_ii and 1 / (K^-1)_ii, the closed form of leaving it out; for the others y_i minus
 * the prediction for their group.
 */
export function deletedDeviations(
  model: GroupedModel,
  rows: GroupedRows,
  use: Uint8Array,
  deviation: Float64Array,
  deviationVariance: Float64Array,
): void {
  const { n, design, stride, response, variance, group } = rows;
  for (let i = 0; i < n; i++) {
    const at = i * stride;
    const g = group[i]!;
    const residual = response[i]! - expected(model, design, at) - model.offsets[g]!;
    const d = variance[i]!;
    const v = groupVariance(model, design, at, g);
    if (use[i] === 0) {
      deviation[i] = residual;
      deviationVariance[i] = d + v;
    } else {
      // 1 - leverage, kept away from the 0 that rounding could make of it.
      const free = Math.max(1 - v / d, 1e-12);
      deviation[i] = residual / free;
      deviationVariance[i] = d / free;
    }
  }
}

/**
 * ln of the marginal density of the used rows, N(y; 0, K): what compares two models of the same rows.
 * With the covariance of one model as (inverse) prior of another it gives the joint density of a new series.
 */
export function logMarginalDensity(model: GroupedModel, rows: GroupedRows, use: Uint8Array): number {
  const { p, prior, coefficients, offsets, offsetVariance, offsetSlack, groups } = model;
  const { n, design, stride, response, variance, group } = rows;
  let quadratic = 0;
  let logDeterminant = model.logDeterminant - logDeterminantOf(prior, p);
  let count = 0;
  for (let i = 0; i < n; i++) {
    if (use[i] === 0) continue;
    const residual = response[i]! - expected(model, design, i * stride) - offsets[group[i]!]!;
    quadratic += (residual * residual) / variance[i]!;
    logDeterminant += Math.log(variance[i]!);
    count++;
  }
  for (let g = 0; g < groups; g++) {
    quadratic += offsets[g]! ** 2 / offsetVariance[g]!;
    logDeterminant += Math.log(offsetVariance[g]! / offsetSlack[g]!);
  }
  for (let j = 0; j < p; j++) {
    for (let k = 0; k < p; k++) quadratic += coefficients[j]! * prior[j * p + k]! * coefficients[k]!;
  }
  return -0.5 * (quadratic + logDeterminant + count * Math.log(2 * Math.PI));
}

/** ln |A| of a symmetric positive definite p x p matrix. */
function logDeterminantOf(a: Float64Array, p: number): number {
  const factor = Float64Array.from(a);
  return invertSymmetric(factor, p, new Float64Array(p * p));
}

/** Puts the posterior precision of one model in the place of another's prior; both have the same p. */
export function priorFromPosterior(target: GroupedModel, source: GroupedModel): void {
  target.prior.set(source.covariance);
  invertSymmetric(target.prior, source.p, target.work);
}
