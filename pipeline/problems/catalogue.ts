import { cellKinds } from "./cell-kinds.ts";
import { commandKinds } from "./command-kinds.ts";
import { fileKinds } from "./file-kinds.ts";
import { identityKinds } from "./identity-kinds.ts";
import type { Kind } from "./kind.ts";
import { rulingKinds } from "./ruling-kinds.ts";
import { safeText } from "./safe-text.ts";

/** Every problem an input can have, by its code. Codes are stable; wording may improve. */
export const kinds = { ...fileKinds, ...cellKinds, ...identityKinds, ...rulingKinds, ...commandKinds };

export type ProblemCode = keyof typeof kinds;

/** Where a problem stands. */
export interface Place {
  /** Name of the source, where there is one. */
  readonly source?: string;
  /** File as the user knows it: relative to the collection, or as given on the command line. */
  readonly file: string;
  /** 1-based physical line. */
  readonly line?: number;
  /** Heading of a table's column, or the key of a JSON file. */
  readonly column?: string;
}

/** One thing that is wrong with an input: data first; the wording that never changes is in {@link kinds}. */
export interface Problem {
  readonly code: ProblemCode;
  readonly place: Place;
  /** What was found, as a phrase; data in it is quoted but not escaped (see {@link formatProblem}). */
  readonly found: string;
  readonly expected: string;
  readonly mend: string;
  /** The row as it stands in the file, for refused readings. */
  readonly raw?: string;
}

/** What a problem says beyond its catalogue entry. */
export interface Details {
  readonly found: string;
  readonly expected?: string;
  readonly mend?: string;
  readonly raw?: string;
}

/** Longest `found` kept: a hostile cell may have a million characters. */
const MAX_FOUND = 1000;

/** A problem of one kind at one place; `expected` and `mend` come from the catalogue unless said more precisely. */
export function problem(code: ProblemCode, place: Place, details: Details): Problem {
  const kind: Kind = kinds[code];
  const { found, expected = kind.expected, mend = kind.mend, raw } = details;
  const short = found.length > MAX_FOUND ? `${found.slice(0, MAX_FOUND)}… (${found.length} characters)` : found;
  return { code, place, found: short, expected, mend, ...(raw === undefined ? {} : { raw }) };
}

/**
 * A problem as three lines for a terminal, with everything unsafe in it made visible:
 * ```
 * sources/a.csv:14 column S: "n.m." is not a number [not-a-number]
 *   expected a number such as 12.5, -3 or 1.2e-4, in digits only
 *   to mend: correct the cell ...
 * ```
 */
export function formatProblem({ code, place, found, expected, mend }: Problem): string {
  const line = place.line === undefined ? "" : `:${place.line}`;
  const column = place.column === undefined ? "" : ` column ${safeText(place.column, 80)}`;
  const head = `${safeText(place.file)}${line}${column}: ${safeText(found, 400)} [${code}]`;
  return `${head}\n  expected ${safeText(expected, 600)}\n  to mend: ${safeText(mend, 600)}`;
}
