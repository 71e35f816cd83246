import type { ElementCounts, Formula, FormulaPart } from "./formula.ts";
import { hillFormula } from "./molar-mass.ts";

/** A formula with crystal solvent, taken apart. */
export interface HydrateParts {
  /** Formula without the guest, as written: `KAl(SO4)2`. */
  readonly anhydrous: string;
  /** Elements of one unit of the unsolvated formula. */
  readonly anhydrousElements: ElementCounts;
  /** Formula of the guest as written: `H2O`. */
  readonly guest: string;
  /** Guest molecules per unit of the unsolvated formula: 5 for CuSO4·5H2O, 8/3 for 3CdSO4·8H2O. */
  readonly guestPerUnit: number;
}

/** Hill formulas of molecules that crystallise as guests; a counter-acid such as HCl is part of a salt, not a guest. */
const GUESTS: ReadonlySet<string> = new Set(
  "H2O D2O CH4O C2H6O C3H8O C4H10O C2H3N C3H6O C2H6OS C3H7NO C4H8O2 C4H8O C6H6 C7H8 CHCl3 CH2Cl2 C2H4O2 H2O2".split(
    " ",
  ),
);

/**
 * Takes a formula with crystal water (or another solvent of crystallisation, written last) apart.
 * Undefined for a formula without such a part; a Hill formula hides its crystal water and cannot be taken apart.
 *
 * @example hydrateParts(parseFormula("CaSO4·0.5H2O")) // anhydrous "CaSO4", guest "H2O", guestPerUnit 0.5
 */
export function hydrateParts({ parts }: Formula): HydrateParts | undefined {
  const guest = parts.at(-1);
  const main = parts.slice(0, -1);
  if (guest === undefined || main.length === 0) return undefined;
  const [only] = main;
  const single = main.length === 1 && only !== undefined ? only : undefined;
  const anhydrousElements = single?.elements ?? sumOfParts(main);
  const { molecule, coefficient } = unwrapped(guest);
  const isGuest = GUESTS.has(hillFormula(molecule));
  if (!isGuest || (single !== undefined && GUESTS.has(hillFormula(anhydrousElements)))) return undefined;
  return {
    anhydrous: single === undefined ? main.map(({ text }) => text).join("·") : withoutCoefficient(single.text),
    anhydrousElements,
    guest: withoutCoefficient(guest.text).replace(/^\((.*)\)\d*$/, "$1"),
    guestPerUnit: coefficient / (single?.coefficient ?? 1),
  };
}

const withoutCoefficient = (text: string): string => text.replace(/^[\d./]+/, "");

/** The guest molecule and how many of it: also for `(H2O)10`, where the count stands behind the bracket. */
function unwrapped({ text, coefficient, elements }: FormulaPart): { molecule: ElementCounts; coefficient: number } {
  const behind = Number(/\)(\d+)$/.exec(text)?.[1] ?? 1);
  if (behind === 1) return { molecule: elements, coefficient };
  return {
    molecule: new Map([...elements].map(([symbol, count]) => [symbol, count / behind])),
    coefficient: coefficient * behind,
  };
}

function sumOfParts(parts: readonly FormulaPart[]): ElementCounts {
  const sum = new Map<string, number>();
  for (const { coefficient, elements } of parts) {
    for (const [symbol, count] of elements) sum.set(symbol, (sum.get(symbol) ?? 0) + coefficient * count);
  }
  return sum;
}
