import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";

const folder = new URL("../../../shared/reference/statistics/", import.meta.url);

/** A file of the large collection of reference values kept beside the project, or undefined where that is absent. */
export function referenceValues<T>(file: string): T | undefined {
  const path = fileURLToPath(new URL(file, folder));
  return existsSync(path) ? (JSON.parse(readFileSync(path, "utf8")) as T) : undefined;
}

/** Why a sweep over the collection is skipped; goes into the title of the test. */
export const SKIPPED_WHERE_ABSENT = "(skipped where ../shared/reference/statistics is absent)";

/** |a / b - 1|, or |a| where b is 0. */
export function relativeError(found: number, expected: number): number {
  return expected === 0 ? Math.abs(found) : Math.abs(found / expected - 1);
}

/** The largest relative error of two lists of the same length. */
export function worstRelativeError(found: ArrayLike<number>, expected: readonly number[]): number {
  return expected.reduce((worst, value, i) => Math.max(worst, relativeError(found[i]!, value)), 0);
}
