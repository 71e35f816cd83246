import type { CanonizerUtil as CanonizerClass, Molecule as MoleculeClass } from "openchemlib";
import { loadSmilesReader, type SmilesComposition } from "./smiles-formula.ts";

/** What a SMILES says of a structure, in forms that can be compared. */
export interface Structure {
  readonly ok: true;
  /** The same for every way of writing one structure; stereochemistry counts, the place of protons in a zwitterion not. */
  readonly code: string;
  /** Code of the structure without its stereochemistry: equal to `code` where the SMILES states none. */
  readonly skeleton: string;
  /** Code without stereochemistry that all tautomers share: to ask whether two structures may be one, not to merge them. */
  readonly tautomers: () => string;
  /** A SMILES made from the code, so that it does not depend on how the structure was written. */
  readonly smiles: () => string;
  /** Hill formula; "" where the structure has no molar mass. */
  readonly formula: string;
  /** Molar mass [g/mol] by the 2021 atomic weights; NaN where the structure has none (an unusual isotope). */
  readonly molarMass: number;
}

/** Why a SMILES cannot be compared. */
export interface StructureFault {
  readonly ok: false;
  readonly message: string;
}

/** Reads a SMILES into forms that can be compared. */
export type StructureReader = (smiles: string) => Structure | StructureFault;

/** What is used of the structure library. */
export interface Library {
  readonly Molecule: typeof MoleculeClass;
  readonly CanonizerUtil: typeof CanonizerClass;
}

/** Said where the structure library is not installed. */
const NO_LIBRARY =
  "the structure library is not installed: SMILES are compared letter by letter, and give no molar mass";

const STEREO = /[\\/]|@+(?:(?:TH|AL|SP|TB|OH)\d+)?/g;

/**
 * Loads a reader of structures; without the library (openchemlib, optional) every SMILES is answered with that fault.
 * Each text is read once.
 *
 * The code is the library's canonical code after moving protons so that a zwitterion and its neutral form agree
 * (`[NH3+]CC([O-])=O` is `NCC(O)=O`); salts keep their ions. Tautomers stay apart. Stereochemistry needs coordinates,
 * which the library makes up (2 ms); without marks of stereochemistry none are needed (0.5 ms).
 */
export async function loadStructureReader(
  load: () => Promise<Library> = () => import("openchemlib"),
): Promise<StructureReader> {
  const library = await load().catch(() => undefined);
  if (library === undefined) return () => ({ ok: false, message: NO_LIBRARY });
  const composition = await loadSmilesReader();
  const known = new Map<string, Structure | StructureFault>();
  return (smiles) => {
    const text = smiles.trim();
    const before = known.get(text);
    if (before !== undefined) return before;
    const read = composition(text);
    const structure =
      read.ok || / has no atomic weight$/.test(read.message)
        ? structureOf(library, text, read.ok ? read : undefined)
        : read;
    known.set(text, structure);
    return structure;
  };
}

function structureOf(
  { Molecule, CanonizerUtil }: Library,
  text: string,
  composition: SmilesComposition | undefined,
): Structure | StructureFault {
  const formula = composition?.formula ?? "";
  const molarMass = composition?.molarMass.value ?? Number.NaN;
  try {
    const flat = text.replace(STEREO, "");
    const plain = Molecule.fromSmiles(flat, { noCoordinates: true, noStereo: true });
    plain.canonizeCharge(true);
    const skeleton = plain.getIDCode();
    const same: Structure = {
      ok: true,
      code: skeleton,
      skeleton,
      formula,
      molarMass,
      tautomers: () => CanonizerUtil.getIDCode(plain, CanonizerUtil.NOSTEREO_TAUTOMER),
      smiles: () => plain.toIsomericSmiles(),
    };
    if (flat === text) return same;
    const full = placed(Molecule, text);
    // Marks at an atom that is no stereocentre say nothing.
    if (full === placed(Molecule, flat)) return same;
    // Made from the code, because a symmetric structure can be written with its marks in several ways.
    const smiles = () => Molecule.fromIDCode(full).toIsomericSmiles();
    // Without coordinates the library takes an open double bond for E: a prefix keeps the two kinds of code apart.
    return { ...same, code: `stereo ${full}`, smiles };
  } catch {
    return { ok: false, message: "not a SMILES that can be read" };
  }
}

/** Canonical code with coordinates, which stereochemistry needs. */
function placed(Molecule: typeof MoleculeClass, smiles: string): string {
  const molecule = Molecule.fromSmiles(smiles);
  molecule.canonizeCharge(true);
  return molecule.getIDCode();
}
