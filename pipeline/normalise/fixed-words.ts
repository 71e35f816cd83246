import type { CellFault } from "../records/cells.ts";

/** Methods whose values are shown and never fitted. */
const NEVER_FITTED: ReadonlySet<string> = new Set(["cloud-point", "kinetic-from-stock"]);
const METHODS: readonly string[] = [
  ...["gravimetric", "titration", "hplc", "uv", "refractive-index", "isothermal-synthetic"],
  ...["clear-point", "cloud-point", "kinetic-from-stock", "unspecified"],
];
const EXCESS_SOLID: readonly string[] = ["", "yes", "no", "unknown"];

/** The fault of a field with fixed words that holds another; it lists them. */
function wrongWord(field: string, text: string, words: readonly string[]): CellFault | undefined {
  if (words.includes(text)) return undefined;
  const known = words.filter((word) => word !== "").join(", ");
  return { field, code: "bad-choice", found: `${field} "${text}"`, expected: `one of ${known}` };
}

/** The fault of a method that is none; undefined for a known one. */
export function wrongMethod(text: string): CellFault | undefined {
  return wrongWord("method", text, METHODS);
}

/** The fault of an `excess_solid` that is none of yes, no and unknown; undefined where it is or is not stated. */
export function wrongExcessSolid(text: string): CellFault | undefined {
  return wrongWord("excess_solid", text, EXCESS_SOLID);
}

/** True for a method whose values are shown and never fitted: cloud points and kinetic values. */
export function isNeverFitted(method: string): boolean {
  return NEVER_FITTED.has(method);
}
