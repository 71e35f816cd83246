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

const MARK = /[\\/@]/;
const EVERY_MARK = /[\\/]|@+(?:(?:TH|AL|SP|TB|OH)\d+)?/g;

/**
 * Loads a reader of structures; without the library (openchemlib, optional) every SMILES is answered with that fault.
 * Each text is read once, for its composition; the forms that are compared are worked out when first asked for, since most
 * structures are never compared.
 *
 * The code is the library's canonical code after moving protons so that a zwitterion and its neutral form agree
 * (`[NH3+]CC([O-])=O` is `NCC(O)=O`); salts keep their ions. Tautomers stay apart. Stereochemistry needs coordinates,
 * which the library makes up (2 ms); without marks of stereochemistry none are needed (0.3 ms).
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
  library: Library,
  text: string,
  composition: SmilesComposition | undefined,
): Structure | StructureFault {
  const marked = MARK.test(text);
  try {
    // The composition was read from the text without its marks; without a composition nothing was read.
    if (marked || composition === undefined) library.Molecule.fromSmiles(text, { noCoordinates: true });
  } catch {
    return { ok: false, message: "not a SMILES that can be read" };
  }
  const itself = `text ${text}`;
  const skeleton = lazily(() => flatMolecule(library, text).getIDCode(), itself);
  const code = lazily(() => (marked ? (stereoCode(library, text) ?? skeleton()) : skeleton()), itself);
  return {
    ok: true,
    formula: composition?.formula ?? "",
    molarMass: composition?.molarMass.value ?? Number.NaN,
    get code() {
      return code();
    },
    get skeleton() {
      return skeleton();
    },
    tautomers: lazily(
      () => library.CanonizerUtil.getIDCode(flatMolecule(library, text), library.CanonizerUtil.NOSTEREO_TAUTOMER),
      itself,
    ),
    smiles: lazily(() => (code() === itself ? text : writtenFrom(library, text, code())), text),
  };
}

/**
 * Works a form out when it is first asked for, and keeps the text alone: a molecule takes kilobytes. A structure on which
 * the library fails after all equals nothing but the same text.
 */
function lazily(compute: () => string, otherwise: string): () => string {
  let known: string | undefined;
  return () => {
    try {
      known ??= compute();
    } catch {
      known = otherwise;
    }
    return known;
  };
}

/** The structure without its stereochemistry. */
function flatMolecule({ Molecule }: Library, text: string): MoleculeClass {
  const molecule = Molecule.fromSmiles(text.replace(EVERY_MARK, ""), { noCoordinates: true, noStereo: true });
  molecule.canonizeCharge(true);
  return molecule;
}

/** Without coordinates the library takes an open double bond for E: this keeps the two kinds of code apart. */
const PLACED = "stereo ";

/** Code with stereochemistry; undefined where the marks, at an atom that is no stereocentre, say nothing. */
function stereoCode({ Molecule }: Library, text: string): string | undefined {
  const full = placed(Molecule, text);
  return full === placed(Molecule, text.replace(EVERY_MARK, "")) ? undefined : PLACED + full;
}

/** SMILES of a code with stereochemistry: a symmetric structure can be written with its marks in several ways. */
function writtenFrom(library: Library, text: string, code: string): string {
  return code.startsWith(PLACED)
    ? library.Molecule.fromIDCode(code.slice(PLACED.length)).toIsomericSmiles()
    : flatMolecule(library, text).toIsomericSmiles();
}

/** Canonical code with coordinates, which stereochemistry needs. */
function placed(Molecule: typeof MoleculeClass, smiles: string): string {
  const molecule = Molecule.fromSmiles(smiles);
  molecule.canonizeCharge(true);
  return molecule.getIDCode();
}
