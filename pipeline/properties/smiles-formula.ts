import type { Molecule } from "openchemlib";
import type { ElementCounts } from "./formula.ts";
import { hillFormula, molarMassOfElements } from "./molar-mass.ts";
import type { PropertyValue } from "./property-value.ts";

/** What a SMILES says of the composition of a substance. */
export interface SmilesComposition {
  readonly ok: true;
  /** Atoms with all hydrogens; deuterium and tritium are counted as D and T. */
  readonly elements: ElementCounts;
  readonly charge: number;
  /** Hill formula. */
  readonly formula: string;
  /** Molar mass [g/mol] by the 2021 atomic weights. */
  readonly molarMass: PropertyValue;
}

/** Why a SMILES cannot be read. */
export interface SmilesFault {
  readonly ok: false;
  readonly message: string;
}

/** Reads the composition from a SMILES. */
export type SmilesReader = (smiles: string) => SmilesComposition | SmilesFault;

/** Longest SMILES read: a hostile cell may have a million characters. */
const LONGEST = 2000;

/**
 * Loads a reader of SMILES. Loading takes about 0.2 s, so that it is done only where a row needs it.
 *
 * Valences and aromatic rings are those of openchemlib; a bracket atom carries the hydrogens written in its bracket and
 * no others (OpenSMILES 3.1.2). Unknown atoms (`*`) and isotopes other than of hydrogen are refused: they have no
 * atomic weight.
 */
export async function loadSmilesReader(): Promise<SmilesReader> {
  const { Molecule } = await import("openchemlib");
  return (smiles) => {
    const text = smiles.trim();
    if (text === "") return { ok: false, message: "an empty SMILES" };
    if (text.length > LONGEST) return { ok: false, message: `a SMILES longer than ${LONGEST} characters` };
    if (!bracketsClose(text)) return { ok: false, message: "a bracket of the SMILES is not closed" };
    const tokens = atomTokens(text);
    const refused = tokens.find(({ symbol, isotope }) => symbol === "*" || (isotope !== undefined && symbol !== "H"));
    if (refused !== undefined) return { ok: false, message: `the atom ${refused.text} has no atomic weight` };
    try {
      const molecule = Molecule.fromSmiles(text, { noCoordinates: true, noStereo: true });
      return compositionOf(molecule, tokens);
    } catch {
      return { ok: false, message: "not a SMILES that can be read" };
    }
  };
}

/** The library overlooks brackets that are never closed. */
function bracketsClose(smiles: string): boolean {
  let depth = 0;
  for (const character of smiles) {
    if (character === "(") depth++;
    if (character === ")" && --depth < 0) return false;
  }
  return depth === 0;
}

interface AtomToken {
  readonly text: string;
  readonly symbol: string;
  readonly isotope: number | undefined;
  /** Hydrogens written in the bracket; undefined for an atom without a bracket. */
  readonly hydrogens: number | undefined;
}

const ATOM = /\[(\d+)?(\*|[A-Za-z][a-z]?)(?:@+(?:[A-Z]{2}\d+)?)?(?:H(\d*))?[^\]]*\]|Br|Cl|[BCNOPSFI]|[bcnops]|\*/g;

/** Atoms in the order of the SMILES. */
function atomTokens(smiles: string): AtomToken[] {
  return Array.from(smiles.matchAll(ATOM), ([text, isotope, bracketSymbol, hydrogens]) => {
    const symbol = bracketSymbol ?? text;
    return {
      text,
      symbol: symbol.charAt(0).toUpperCase() + symbol.slice(1),
      isotope: isotope === undefined ? undefined : Number(isotope),
      hydrogens: bracketSymbol === undefined ? undefined : writtenHydrogens(hydrogens),
    };
  });
}

const writtenHydrogens = (digits: string | undefined): number =>
  digits === undefined ? 0 : digits === "" ? 1 : Number(digits);

/**
 * Counts the atoms. The library may turn written hydrogen atoms into implicit ones and reorder atoms; where it did, its
 * own count of hydrogens is taken, else the bracket's.
 */
function compositionOf(molecule: Molecule, tokens: readonly AtomToken[]): SmilesComposition {
  const heavy = tokens.filter(({ symbol }) => symbol !== "H");
  const hydrogens = tokens.filter(({ symbol }) => symbol === "H");
  const atoms = Array.from({ length: molecule.getAllAtoms() }, (_, atom) => atom);
  const heavyAtoms = atoms.filter((atom) => molecule.getAtomicNo(atom) !== 1);
  const inOrder =
    atoms.length - heavyAtoms.length >= hydrogens.length &&
    heavy.length === heavyAtoms.length &&
    heavyAtoms.every((atom, place) => molecule.getAtomLabel(atom) === heavy[place]?.symbol);
  const elements = new Map<string, number>();
  const add = (symbol: string, count: number) => {
    if (count > 0) elements.set(symbol, (elements.get(symbol) ?? 0) + count);
  };
  for (const [place, atom] of heavyAtoms.entries()) {
    add(molecule.getAtomLabel(atom), 1);
    add("H", (inOrder ? heavy[place]?.hydrogens : undefined) ?? molecule.getImplicitHydrogens(atom));
  }
  if (inOrder) for (const { isotope } of hydrogens) add(hydrogenSymbol(isotope ?? 0), 1);
  else
    for (const atom of atoms) if (molecule.getAtomicNo(atom) === 1) add(hydrogenSymbol(molecule.getAtomMass(atom)), 1);
  if (inOrder) for (const { hydrogens: bound } of hydrogens) add("H", bound ?? 0);
  const charge = atoms.reduce((sum, atom) => sum + molecule.getAtomCharge(atom), 0);
  return { ok: true, elements, charge, formula: hillFormula(elements), molarMass: molarMassOfElements(elements) };
}

const hydrogenSymbol = (mass: number): string => (mass === 2 ? "D" : mass === 3 ? "T" : "H");
