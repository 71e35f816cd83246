import { plainSpelling } from "./unit-spelling.ts";

/** A descriptive term as an interval of mL of solvent needed per gram of solute, at 15 to 25 °C. */
export interface PharmacopoeiaTerm {
  readonly term: string;
  /** Lower end [mL solvent/g]; undefined where the term has none. */
  readonly from: number | undefined;
  /** Upper end [mL solvent/g]; undefined where the term has none. */
  readonly to: number | undefined;
}

const practicallyInsoluble: PharmacopoeiaTerm = { term: "practically insoluble", from: 10000, to: undefined };

const terms: ReadonlyMap<string, PharmacopoeiaTerm> = new Map([
  ["very soluble", { term: "very soluble", from: undefined, to: 1 }],
  ["freely soluble", { term: "freely soluble", from: 1, to: 10 }],
  ["soluble", { term: "soluble", from: 10, to: 30 }],
  ["sparingly soluble", { term: "sparingly soluble", from: 30, to: 100 }],
  ["slightly soluble", { term: "slightly soluble", from: 100, to: 1000 }],
  ["very slightly soluble", { term: "very slightly soluble", from: 1000, to: 10000 }],
  ["practically insoluble", practicallyInsoluble],
  ["insoluble", practicallyInsoluble],
  ["practically insoluble or insoluble", practicallyInsoluble],
]);

/**
 * The interval a descriptive term of solubility stands for, or undefined if the text is none. Case, spacing, commas and
 * a closing full stop are free. "Miscible" is not among the terms: it names no solubility.
 *
 * The ends belong to both neighbours. The parts are mL of solvent per gram of solute, so the mass per volume of solvent
 * lies between 1000/to and 1000/from kg/m3.
 * @see USP General Notices 5.30; European Pharmacopoeia 1.4.
 */
export function pharmacopoeiaTerm(text: string): PharmacopoeiaTerm | undefined {
  const plain = plainSpelling(text)?.toLowerCase().replace(/,\s*/g, " ").replace(/\.$/, "").trim();
  return plain === undefined ? undefined : terms.get(plain);
}
