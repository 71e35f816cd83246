import { parseFormula } from "../properties/formula.ts";
import { molarMass as massOfFormula } from "../properties/molar-mass.ts";
import type { SolidForm, Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import { parseNumber } from "../records/number-text.ts";
import type { Identifier, SoluteCells } from "./solute-cells.ts";

/** Relative difference above which two molar masses are not of one substance: a hydrogen in 200 g/mol is 0.5 %. */
const MASS_TOLERANCE = 0.003;

/** What formula, structure and molar mass of a row add to its solute. */
export interface Composition {
  /** Molar mass of the unsolvated solute, g/mol; NaN where unknown. */
  readonly molarMass: number;
  /** The hydrate or solvate that the row's formula stands for. */
  readonly form?: SolidForm;
  /** A formula that cannot be read, where nothing depends on it. */
  readonly unread?: string;
}

const apart = (a: number, b: number): boolean => Math.abs(a / b - 1) > MASS_TOLERANCE;

const contradiction = (field: string, found: string): CellFault => ({ field, code: "contradictory-molar-mass", found });

/**
 * Molar mass of the solute: that of the tables, else from the row's formula, else from its SMILES, else as stated. Any two
 * of these that differ by more than 0.3 % are a fault, because it is open whether the amounts are those of a hydrate, a
 * salt or the free base. A formula with the crystal solvent of a listed form stands for that form.
 */
export function compositionOf(
  cells: SoluteCells,
  substance: Substance | undefined,
  identifiers: readonly Identifier[],
  index: SubstanceIndex,
): Composition | CellFault {
  const formula = cells.formula === "" ? undefined : parseFormula(cells.formula);
  const needed = substance?.molarMass === undefined;
  if (formula !== undefined && "fault" in formula && needed) {
    return { field: "formula", code: "invalid-formula", found: `"${cells.formula}": ${formula.message}` };
  }
  const read = formula === undefined || "fault" in formula ? undefined : formula;
  const named = read === undefined || substance === undefined ? undefined : index.resolve(cells.formula);
  const form = named?.substance.name === substance?.name ? named?.form : undefined;
  const ofFormula = read === undefined || form !== undefined ? Number.NaN : massOfFormula(read).value;
  const structure = identifiers.find(({ kind }) => kind === "SMILES")?.structure;
  const ofStructure = structure?.molarMass ?? Number.NaN;
  const ofTables = substance?.molarMass ?? Number.NaN;
  if (read !== undefined && apart(ofFormula, ofTables)) {
    const found = `formula ${cells.formula} (${ofFormula.toFixed(3)} g/mol), but ${substance?.name} is ${ofTables.toFixed(3)} g/mol`;
    return contradiction("formula", found);
  }
  if (read !== undefined && apart(ofFormula, ofStructure)) {
    const found = `formula ${cells.formula} (${ofFormula.toFixed(3)} g/mol), but the SMILES is ${structure?.formula} (${ofStructure.toFixed(3)} g/mol)`;
    return contradiction("formula", found);
  }
  const known = [ofTables, ofFormula, ofStructure].find((mass) => !Number.isNaN(mass)) ?? Number.NaN;
  const molarMass = withStated(cells, known);
  if (typeof molarMass !== "number") return molarMass;
  const unread =
    formula !== undefined && "fault" in formula ? `formula "${cells.formula}": ${formula.message}` : undefined;
  return { molarMass, ...(form === undefined ? {} : { form }), ...(unread === undefined ? {} : { unread }) };
}

/** The molar mass known, or else the one stated in the row; a fault where they contradict one another. */
function withStated({ molarMass: text, decimal }: SoluteCells, known: number): number | CellFault {
  if (text === "") return known;
  const read = parseNumber(text, decimal);
  const stated = read.ok ? read.value : Number.NaN;
  if (!(stated > 0)) {
    return { field: "molar_mass", code: "not-a-number", found: `"${text}" is not a molar mass in g/mol` };
  }
  if (Number.isNaN(known)) return stated;
  if (!apart(stated, known)) return known;
  const found = `molar mass ${stated} g/mol, but ${known.toFixed(3)} g/mol follows from the substance or formula`;
  return contradiction("molar_mass", found);
}
