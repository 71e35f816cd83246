/**
 * Median, median absolute deviation and quantiles by selection on a scratch array: linear time, no allocation.
 * The `InPlace` functions reorder the first n numbers of the array they are given; the others copy first.
 * Numbers must not be NaN, which has no place in an order; infinities are allowed.
 */

/** 1 / Phi^-1(3/4): makes the median absolute deviation of normal data estimate their standard deviation. */
export const MAD_TO_SIGMA = 1.482602218505602;

/** The k-th smallest (k from 0) of the first n numbers; reorders them so that smaller ones stand before place k. */
export function selectInPlace(values: Float64Array, n: number, k: number): number {
  let low = 0;
  let high = n - 1;
  while (low < high) {
    const pivot = medianOfThree(values[low]!, values[(low + high) >> 1]!, values[high]!);
    let i = low;
    let j = high;
    while (i <= j) {
      while (values[i]! < pivot) i += 1;
      while (values[j]! > pivot) j -= 1;
      if (i <= j) {
        const swap = values[i]!;
        values[i] = values[j]!;
        values[j] = swap;
        i += 1;
        j -= 1;
      }
    }
    if (k <= j) high = j;
    else if (k >= i) low = i;
    else break;
  }
  return values[k]!;
}

/**
 * Median of the first n numbers (mean of the middle two for even n), reordering them.
 * @throws RangeError if n is below 1 or above the length.
 */
export function medianInPlace(values: Float64Array, n: number = values.length): number {
  requireCount("median", values, n);
  const middle = n >> 1;
  const upper = selectInPlace(values, n, middle);
  if (n % 2 === 1) return upper;
  const lower = largest(values, middle);
  return lower === upper ? upper : lower + (upper - lower) / 2;
}

/** Median of a list of numbers, which stays as it is. @throws RangeError if the list is empty. */
export function median(values: ArrayLike<number>): number {
  return medianInPlace(Float64Array.from(values));
}

/**
 * Median absolute deviation about `centre` (by default the median) of the first n numbers, raw: multiply by
 * {@link MAD_TO_SIGMA} for a standard deviation. `scratch` takes at least n numbers and is overwritten.
 * @throws RangeError if n is below 1 or above a length.
 */
export function medianAbsoluteDeviationInto(
  scratch: Float64Array,
  values: ArrayLike<number>,
  n: number,
  centre?: number,
): number {
  requireCount("median absolute deviation", values, n);
  requireCount("median absolute deviation (scratch)", scratch, n);
  let middle = centre;
  if (middle === undefined) {
    for (let i = 0; i < n; i++) scratch[i] = values[i]!;
    middle = medianInPlace(scratch, n);
  }
  for (let i = 0; i < n; i++) scratch[i] = Math.abs(values[i]! - middle);
  return medianInPlace(scratch, n);
}

/** Median absolute deviation (raw) of a list of numbers about its median. @throws RangeError if the list is empty. */
export function medianAbsoluteDeviation(values: ArrayLike<number>): number {
  return medianAbsoluteDeviationInto(new Float64Array(values.length), values, values.length);
}

/**
 * Quantile of the first n numbers by linear interpolation between order statistics at 1 + (n - 1) probability
 * (type 7 of Hyndman and Fan), reordering them.
 * @throws RangeError unless the probability lies in [0, 1] and n is between 1 and the length.
 * @see Hyndman and Fan, Am. Stat. 50 (1996) 361-365.
 */
export function quantileInPlace(values: Float64Array, n: number, probability: number): number {
  requireCount("quantile", values, n);
  if (!(probability >= 0 && probability <= 1))
    throw new RangeError(`quantile: probability ${probability} is not in [0, 1]`);
  const position = (n - 1) * probability;
  const below = Math.floor(position);
  const fraction = position - below;
  if (fraction === 0) return selectInPlace(values, n, below);
  const upper = selectInPlace(values, n, below + 1);
  const lower = largest(values, below + 1);
  return lower === upper ? upper : lower + fraction * (upper - lower);
}

/** Quantile (type 7) of a list of numbers, which stays as it is. @throws RangeError as {@link quantileInPlace}. */
export function quantile(values: ArrayLike<number>, probability: number): number {
  return quantileInPlace(Float64Array.from(values), values.length, probability);
}

function medianOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}

function largest(values: Float64Array, n: number): number {
  let most = values[0]!;
  for (let i = 1; i < n; i++) if (values[i]! > most) most = values[i]!;
  return most;
}

function requireCount(what: string, values: ArrayLike<number>, n: number): void {
  if (!(n >= 1 && n <= values.length))
    throw new RangeError(`${what}: ${n} numbers asked of a list of ${values.length}`);
}
