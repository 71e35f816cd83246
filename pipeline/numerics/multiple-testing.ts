/**
 * Benjamini-Hochberg adjusted p-values, in the order given: reject those of at most q, and the expected share of
 * wrong rejections is at most q for independent (or positively dependent) tests. Input stays as it is.
 *
 * adjusted p(i) = min over j >= i of p(j) m / j, over the m ordered p-values, at most 1.
 * @throws RangeError if a p-value lies outside [0, 1].
 * @see Benjamini and Hochberg, J. R. Stat. Soc. B 57 (1995) 289-300; Yekutieli and Benjamini (1999) for the adjusted form.
 */
export function benjaminiHochberg(pValues: ArrayLike<number>): Float64Array {
  const m = pValues.length;
  requireProbabilities(pValues);
  const order = Uint32Array.from({ length: m }, (_, i) => i).sort((a, b) => pValues[a]! - pValues[b]!);
  const adjusted = new Float64Array(m);
  let smallest = 1;
  for (let rank = m; rank >= 1; rank--) {
    const i = order[rank - 1]!;
    smallest = Math.min(smallest, pValues[i]! * (m / rank));
    adjusted[i] = smallest;
  }
  return adjusted;
}

/**
 * The largest p-value that the Benjamini-Hochberg procedure rejects at rate q, or -1 if it rejects none: reject what is
 * at most that. Leaner than the adjusted values for millions of tests.
 *
 * Under dependence it guarantees nothing; it keeps the share of false rejections near q in practice.
 * @param total number of tests, where those whose p-value is known to exceed q are only counted, not listed
 * @throws RangeError if q or a p-value lies outside [0, 1].
 */
export function benjaminiHochbergThreshold(pValues: ArrayLike<number>, q: number, total = pValues.length): number {
  if (!(q >= 0 && q <= 1)) throw new RangeError(`Benjamini-Hochberg: a rate lies between 0 and 1, not ${q}`);
  requireProbabilities(pValues);
  const sorted = Float64Array.from(pValues).sort();
  for (let rank = sorted.length; rank >= 1; rank--) {
    // The product is that of the adjusted p-value, so that both functions agree at the limit itself.
    if (sorted[rank - 1]! * (total / rank) <= q) return sorted[rank - 1]!;
  }
  return -1;
}

function requireProbabilities(pValues: ArrayLike<number>): void {
  for (let i = 0; i < pValues.length; i++) {
    const p = pValues[i]!;
    if (!(p >= 0 && p <= 1)) throw new RangeError(`Benjamini-Hochberg: p-value ${i} is ${p}`);
  }
}
