import { readInchikey } from "../properties/inchikey.ts";
import { readRegistryNumber } from "../properties/registry-number.ts";
import { suggestedNumbers } from "../properties/registry-number-suggestions.ts";
import type { Structure, StructureFault } from "../properties/smiles-structure.ts";
import type { ResolvedName, Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import type { DecimalMark } from "../records/number-text.ts";
import { listedStructure } from "./listed-structures.ts";

/** What a row says of its solute; "" where it says nothing. */
export interface SoluteCells {
  readonly solute: string;
  readonly cas: string;
  readonly inchikey: string;
  readonly smiles: string;
  readonly formula: string;
  readonly molarMass: string;
  /** Decimal mark of the row's source. */
  readonly decimal: DecimalMark;
}

/** Reads a SMILES; undefined where no structures are read at all. */
export type ReadStructure = (smiles: string) => Structure | StructureFault | undefined;

/** One identifier of a row and what it stands for. */
export interface Identifier {
  readonly kind: "InChIKey" | "registry number" | "SMILES";
  readonly field: string;
  /** As the row has it. */
  readonly text: string;
  /** The one spelling of it under which a solute goes that is in no table. */
  readonly key: string;
  readonly structure: Structure | undefined;
  readonly listed: ResolvedName | undefined;
}

/** The identifiers of a row, strongest first, and what is left as a name. */
export interface ReadIdentifiers {
  readonly identifiers: readonly Identifier[];
  /** "" where the solute's cell is empty or holds an identifier. */
  readonly name: string;
  /** Why the SMILES could not be compared; undefined where it could or there is none. */
  readonly structureFault: string | undefined;
}

const ORDER: readonly Identifier["kind"][] = ["InChIKey", "registry number", "SMILES"];

/** A text that wants to be a registry number or InChIKey, right or wrong. */
const LIKE_IDENTIFIER =
  /^(?:CAS[ .:#-]*(?:RN|No\.?)?[ .:]*[\d-]+|\[?\d{2,7}-\d{2}-\d\]?|[A-Za-z]{14}-[A-Za-z]{10}-[A-Za-z])$/;

/**
 * Reads the identifiers of a row. The cell of the solute may hold one too. A registry number or InChIKey that is not well
 * formed is a fault, with what it may have been: the row is never identified by its name instead, because one of the
 * two is wrong.
 */
export function readIdentifiers(
  cells: SoluteCells,
  index: SubstanceIndex,
  read: ReadStructure,
): ReadIdentifiers | CellFault {
  const identifiers: Identifier[] = [];
  const given = [
    cells.inchikey === "" ? undefined : inchikeyOf(cells.inchikey, "inchikey", index),
    cells.cas === "" ? undefined : registryNumberOf(cells.cas, "cas", index),
  ].filter((found) => found !== undefined);
  const own = identifierInName(cells, given.length, index);
  for (const found of own === undefined ? given : [...given, own]) {
    if ("code" in found) return found;
    identifiers.push(found);
  }
  const structure = cells.smiles === "" ? undefined : read(cells.smiles);
  if (cells.smiles !== "") identifiers.push(smilesOf(cells.smiles, structure, index, read));
  identifiers.sort((a, b) => ORDER.indexOf(a.kind) - ORDER.indexOf(b.kind));
  return {
    identifiers,
    name: own === undefined ? cells.solute : "",
    structureFault: structure === undefined || structure.ok ? undefined : structure.message,
  };
}

/** The identifier that stands in the solute's own cell, if it is one; a broken one matters where it stands alone. */
function identifierInName(
  { solute, smiles }: SoluteCells,
  others: number,
  index: SubstanceIndex,
): Identifier | CellFault | undefined {
  const asKey = readInchikey(solute);
  if (asKey.ok) return inchikeyOf(solute, "solute", index);
  const asNumber = readRegistryNumber(solute);
  if (asNumber.ok) return registryNumberOf(solute, "solute", index);
  if (others > 0 || smiles !== "") return undefined;
  // A plain number in this cell is a lot or sample sooner than a count of days.
  const eaten = asNumber.fault === "date" && asNumber.suggestions.length > 0 && !/^\d+$/.test(solute.trim());
  if (!eaten && (!LIKE_IDENTIFIER.test(solute.trim()) || index.resolve(solute) !== undefined)) return undefined;
  return (/^[A-Za-z]{14}-/.test(solute.trim()) ? inchikeyOf : registryNumberOf)(solute, "solute", index);
}

const unsolvated = (found: Substance | undefined, index: SubstanceIndex): ResolvedName | undefined =>
  found === undefined ? undefined : index.unsolvated(found);

function inchikeyOf(text: string, field: string, index: SubstanceIndex): Identifier | CellFault {
  const read = readInchikey(text);
  if (read.ok) {
    const listed = unsolvated(index.byInchikey(read.inchikey), index);
    return { kind: "InChIKey", field, text, key: read.inchikey, structure: undefined, listed };
  }
  const capitals = readInchikey(text.toUpperCase().replace("INCHIKEY=", ""));
  const mend = capitals.ok ? `write ${capitals.inchikey}` : undefined;
  const found = `"${text}": ${read.message}`;
  return { field, code: "invalid-inchikey", found, ...(mend === undefined ? {} : { mend }) };
}

function registryNumberOf(text: string, field: string, index: SubstanceIndex): Identifier | CellFault {
  const read = readRegistryNumber(text);
  if (read.ok) {
    const listed = unsolvated(index.byCas(read.cas), index);
    return { kind: "registry number", field, text, key: read.cas, structure: undefined, listed };
  }
  const likely = suggestedNumbers(text, index.substances).map(({ cas, name }) =>
    name === undefined ? cas : `${cas} (${name})`,
  );
  const question =
    likely.length === 0 ? "copy the number again from its origin" : `likely ${likely.join(" or ")}: check it`;
  const mend = read.fault === "date" ? `${question}, and format the column as text before typing it` : question;
  const says = {
    date: `"${text}" is a registry number that a spreadsheet turned into a date`,
    "check digit": read.message,
    shape: `"${text}": ${read.message}`,
  };
  return { field, code: "invalid-registry-number", found: says[read.fault], mend };
}

function smilesOf(
  text: string,
  structure: Structure | StructureFault | undefined,
  index: SubstanceIndex,
  read: ReadStructure,
): Identifier {
  const known = structure?.ok === true ? structure : undefined;
  const found = index.bySmiles(text) ?? (known === undefined ? undefined : listedStructure(known, index, read));
  return {
    kind: "SMILES",
    field: "smiles",
    text,
    // A canonical SMILES takes long and is the key of few.
    get key() {
      return known?.smiles() ?? text.trim();
    },
    structure: known,
    listed: unsolvated(found, index),
  };
}
