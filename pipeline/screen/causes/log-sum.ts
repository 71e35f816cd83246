/** ln of a sum of numbers given by their logarithms, without overflow; minus infinity where all of them are zero. */
export function logSum(logs: readonly number[]): number {
  const top = Math.max(...logs);
  if (top === Number.NEGATIVE_INFINITY) return top;
  return top + Math.log(logs.reduce((sum, log) => sum + Math.exp(log - top), 0));
}
