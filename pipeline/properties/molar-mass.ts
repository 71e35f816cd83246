import { atomicWeight, standardUncertaintyOfAtomicWeight } from "./atomic-weights.ts";
import type { ElementCounts, Formula } from "./formula.ts";
import type { PropertyValue } from "./property-value.ts";

/** Molar mass of the electron [g/mol], CODATA 2018. */
const ELECTRON = 5.485799e-4;

/** Where molar masses computed here come from. */
export const ATOMIC_WEIGHTS_REFERENCE = "IUPAC 2021 atomic weights (Pure Appl. Chem. 94 (2022) 573)";

/**
 * Molar mass of a formula [g/mol]: M = sum n_i A_i, less the electrons of a positive charge.
 *
 * Standard uncertainty: u^2 = sum (n_i u_i)^2; atoms of one element share the error of its atomic weight, elements are
 * independent. Uses the 2021 atomic weights with rectangular uncertainty.
 *
 * @example molarMass(KAl(SO4)2·12H2O) // 474.37 g/mol, u = 0.02
 */
export function molarMass({ elements, charge }: Formula): PropertyValue {
  const neutral = molarMassOfElements(elements);
  return { ...neutral, value: neutral.value - charge * ELECTRON };
}

/** Molar mass [g/mol] of a neutral collection of atoms. @throws RangeError for a symbol without an atomic weight. */
export function molarMassOfElements(elements: ElementCounts): PropertyValue {
  let value = 0;
  let variance = 0;
  for (const [symbol, count] of elements) {
    const weight = atomicWeight(symbol);
    if (weight === undefined) throw new RangeError(`molarMassOfElements: "${symbol}" has no atomic weight`);
    value += count * weight.value;
    variance += (count * standardUncertaintyOfAtomicWeight(weight)) ** 2;
  }
  return { value, standardUncertainty: Math.sqrt(variance), reference: ATOMIC_WEIGHTS_REFERENCE };
}

/** Element counts as a Hill formula: carbon, hydrogen, then by letter; without carbon all by letter. */
export function hillFormula(elements: ElementCounts): string {
  const withCarbon = elements.has("C");
  const rank = (symbol: string) => (withCarbon ? (symbol === "C" ? 0 : symbol === "H" ? 1 : 2) : 2);
  return [...elements]
    .filter(([, count]) => count > 0)
    .sort(([a], [b]) => rank(a) - rank(b) || (a < b ? -1 : a > b ? 1 : 0))
    .map(([symbol, count]) => (count === 1 ? symbol : `${symbol}${count}`))
    .join("");
}
