/** A continuous law on (0, infinity), given by what Newton's method on the logarithm of a tail needs. */
export interface PositiveLaw {
  /** P(X <= x), precise where small. */
  readonly lower: (x: number) => number;
  /** P(X > x), precise where small. */
  readonly upper: (x: number) => number;
  /** x times the density at x. */
  readonly kernel: (x: number) => number;
}

const LARGEST_LOGARITHM = 700;

/**
 * The x with P(X <= x) = `lower` and P(X > x) = `upper`, by Newton's method in ln x on the logarithm of the smaller
 * tail, kept inside a shrinking bracket. Both probabilities are passed so that neither is rounded away.
 * @throws RangeError if x lies outside 1e-304 to 1e304.
 */
export function quantileOfPositiveLaw(law: PositiveLaw, lower: number, upper: number, start: number): number {
  if (lower === 0) return 0;
  if (upper === 0) return Infinity;
  const fromBelow = lower <= upper;
  const target = Math.log(fromBelow ? lower : upper);
  let low = -LARGEST_LOGARITHM;
  let high = LARGEST_LOGARITHM;
  let u = Math.log(start);
  for (let iteration = 0; iteration < 300; iteration++) {
    const x = Math.exp(u);
    const tail = fromBelow ? law.lower(x) : law.upper(x);
    const excess = fromBelow ? Math.log(tail) - target : target - Math.log(tail);
    if (excess === 0) return x;
    if (excess > 0) high = u;
    else low = u;
    const step = (excess * tail) / law.kernel(x);
    let next = u - step;
    if (!(next > low && next < high)) next = (low + high) / 2;
    const settled = Math.abs(next - u) <= 2e-16 * Math.max(1, Math.abs(u));
    u = next;
    if (settled) break;
  }
  if (Math.abs(u) > LARGEST_LOGARITHM - 1) throw new RangeError("quantile: the result lies outside 1e-304 to 1e304");
  return Math.exp(u);
}
