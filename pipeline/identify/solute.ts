import { parseFormula } from "../properties/formula.ts";
import { molarMass as massOfFormula } from "../properties/molar-mass.ts";
import { isRegistryNumber } from "../properties/registry-number.ts";
import type { ResolvedName, SolidForm, Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import { type DecimalMark, parseNumber } from "../records/number-text.ts";

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

/** A solute that was told apart from all others. */
export interface KnownSolute {
  /** Name in the substance tables, else the strongest identifier given. */
  readonly key: string;
  readonly substance?: Substance;
  /** Solid form that the name or identifier itself stands for (`blue vitriol`). */
  readonly namedForm?: SolidForm;
  /** Molar mass of the unsolvated solute, g/mol; NaN where unknown. */
  readonly molarMass: number;
  /** Identifiers as given, for the table of substances. */
  readonly cells: SoluteCells;
  /** Name and identifiers that stand for different substances: both readings in words. */
  readonly contradiction?: string;
}

/** Molar mass from a SMILES; undefined where it cannot be read. */
export type SmilesMass = (smiles: string) => number | undefined;

/** Relative difference above which two molar masses are not of one substance: a hydrogen in 200 g/mol is 0.5 %. */
const MASS_TOLERANCE = 0.003;

const sameSkeleton = (a: string, b: string): boolean => a.slice(0, 14) === b.slice(0, 14);

/** A substance listed under a name of its own for one of its forms, as the unsolvated substance and that form. */
function unsolvated(substance: Substance | undefined, index: SubstanceIndex): ResolvedName | undefined {
  if (substance?.formOf === undefined) return substance && { substance, form: undefined };
  const parent = index.byName(substance.formOf.substance);
  return parent && { substance: parent, form: index.formOf(parent, substance.formOf.form) };
}

/** The substance an identifier stands for, strongest first: InChIKey, registry number, SMILES, name. */
function strongest(
  { inchikey, cas, smiles, solute }: SoluteCells,
  index: SubstanceIndex,
): [string, ResolvedName | undefined] {
  if (inchikey !== "") return [inchikey, unsolvated(index.byInchikey(inchikey), index)];
  if (cas !== "") return [cas, unsolvated(index.byCas(cas), index)];
  if (smiles !== "") return [smiles, unsolvated(index.bySmiles(smiles), index)];
  const named = index.resolve(solute);
  return [solute, named ?? unsolvated(index.byCas(solute) ?? index.byInchikey(solute), index)];
}

/** Both readings where the name stands for another substance than the identifiers do. */
function contradictionOf(cells: SoluteCells, key: string, index: SubstanceIndex): string | undefined {
  const named = index.resolve(cells.solute)?.substance;
  if (named === undefined || named.name === key) return undefined;
  const stereoOnly =
    cells.inchikey !== "" && named.inchikey !== undefined && sameSkeleton(cells.inchikey, named.inchikey);
  if (stereoOnly) return undefined;
  return `the name "${cells.solute}" stands for ${named.name}, the identifier ${cells.inchikey || cells.cas || cells.smiles} for ${key}`;
}

/** Molar mass from the formula or SMILES of the row, or from its own cell; a fault where they contradict one another. */
function molarMassOf(cells: SoluteCells, substance: Substance | undefined, smilesMass: SmilesMass): number | CellFault {
  let known = substance?.molarMass ?? Number.NaN;
  if (Number.isNaN(known) && cells.formula !== "") {
    const read = parseFormula(cells.formula);
    if ("fault" in read) return { field: "formula", code: "invalid-formula", found: read.fault };
    known = massOfFormula(read).value;
  }
  if (Number.isNaN(known) && cells.smiles !== "") known = smilesMass(cells.smiles) ?? Number.NaN;
  if (cells.molarMass === "") return known;
  const read = parseNumber(cells.molarMass, cells.decimal);
  const stated = read.ok ? read.value : Number.NaN;
  if (!(stated > 0)) {
    return { field: "molar_mass", code: "not-a-number", found: `"${cells.molarMass}" is not a molar mass in g/mol` };
  }
  if (Number.isNaN(known) || Math.abs(stated / known - 1) <= MASS_TOLERANCE)
    return Number.isNaN(known) ? stated : known;
  const found = `molar mass ${stated} g/mol, but ${known.toFixed(3)} g/mol follows from the substance or formula`;
  return { field: "molar_mass", code: "contradictory-molar-mass", found };
}

/**
 * Resolves a solute. The strongest identifier decides; an unknown solute is keyed by it and stays usable where no
 * property is needed. Nothing is guessed from a near spelling.
 */
export function resolveSolute(
  cells: SoluteCells,
  index: SubstanceIndex,
  smilesMass: SmilesMass,
): KnownSolute | CellFault {
  if (cells.solute === "" && cells.cas === "" && cells.inchikey === "" && cells.smiles === "") {
    return { field: "solute", code: "missing-solute", found: "the cell is empty" };
  }
  if (cells.cas !== "" && !isRegistryNumber(cells.cas)) {
    return {
      field: "cas",
      code: "invalid-registry-number",
      found: `"${cells.cas}" is not a valid CAS Registry Number`,
    };
  }
  const namesakes = cells.inchikey || cells.cas || cells.smiles ? [] : index.namesakes(cells.solute);
  if (namesakes.length > 1) {
    const found = `"${cells.solute}" can be ${namesakes.map(({ name }) => name).join(" or ")}`;
    return { field: "solute", code: "unresolved-identity", found };
  }
  const [given, resolved] = strongest(cells, index);
  const substance = resolved?.substance;
  const key = substance?.name ?? given;
  const molarMass = molarMassOf(cells, substance, smilesMass);
  if (typeof molarMass !== "number") return molarMass;
  const contradiction = contradictionOf(cells, key, index);
  return {
    key,
    molarMass,
    cells,
    ...(substance === undefined ? {} : { substance }),
    ...(resolved?.form === undefined ? {} : { namedForm: resolved.form }),
    ...(contradiction === undefined ? {} : { contradiction }),
  };
}
