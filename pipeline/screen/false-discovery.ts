/**
 * Largest p-value rejected by the step-up procedure of Benjamini and Hochberg at rate q, or -1 where none is. Hypotheses
 * whose p-value is known to exceed q need not be listed; they count in `total`.
 *
 * Under dependence it guarantees nothing; it keeps the share of false flags among all flags near q in practice.
 * @see Y. Benjamini, Y. Hochberg, J. R. Stat. Soc. B 57 (1995) 289-300, doi 10.1111/j.2517-6161.1995.tb02031.x.
 */
export function rejectionLimit(pValues: readonly number[], total: number, q: number): number {
  const sorted = Float64Array.from(pValues).sort();
  for (let k = sorted.length; k > 0; k--) {
    const p = sorted[k - 1]!;
    if (p <= (q * k) / total) return p;
  }
  return -1;
}
