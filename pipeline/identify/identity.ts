import type { CompositionBasis } from "../bases/compositions.ts";
import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import type { ReadingSolvent } from "../records/identified.ts";
import type { DecimalMark } from "../records/number-text.ts";
import type { Identity } from "../records/systems.ts";
import { readBasisCell } from "./mixtures/composition-words.ts";
import { type RowValue, soluteFractionOf } from "./mixtures/row-value.ts";
import { changesLiquor, solventWithGuest } from "./mixtures/solvate-liquor.ts";
import { type ResolvedForm, resolveForm } from "./solid-form.ts";
import { type KnownSolute, resolveSolute } from "./solute.ts";
import type { ReadStructure } from "./solute-cells.ts";
import { resolveSolvent } from "./solvent.ts";
import { stereoBeyondName } from "./stereochemistry.ts";

/** Fields that decide which substance, form, solvent and medium a reading is about. */
export const IDENTITY_FIELDS = [
  ...["solute", "cas", "inchikey", "smiles", "formula", "molar_mass", "solid_form", "stereo"],
  ...["solvent", "composition", "composition_basis", "solvent_water_wt_percent", "solvent_grade", "medium"],
];

/** Everything found out about what was dissolved in what. */
export interface ResolvedIdentity {
  readonly solute: KnownSolute;
  readonly form: ResolvedForm;
  readonly solvent: ReadingSolvent;
  readonly identity: Identity;
  /** Assumptions about form and solvent, for the row. */
  readonly assumptions: readonly string[];
  /** The composition of the liquor follows from the row's own value: a row with another value may be another system. */
  readonly ofValue: boolean;
}

/** True where the fractions of a row count its solute, so that its solvent cannot be told without its value. */
export function countsSolute(basisCell: string): boolean {
  return basisCell !== "" && readBasisCell(basisCell)?.solute === "counted";
}

/** Medium with stereochemistry: both keep systems apart. Blanks are folded, case is kept. */
function mediumOf(medium: string, stereo: string): string {
  return [medium.trim().replace(/\s+/g, " "), stereo].filter((part) => part !== "").join("; ");
}

/** Two lists as one; the one that is not empty as it is. */
const joined = (a: readonly string[], b: readonly string[]): readonly string[] =>
  a.length === 0 ? b : b.length === 0 ? a : [...a, ...b];

/** The component whose presence lets a hydrate form: water where there is any, else the main one by name. */
function guestSolvent({ parts }: ReadingSolvent): Substance {
  const water = parts.find(({ substance }) => substance.name === "water");
  return (water ?? parts[0])?.substance as Substance;
}

/**
 * Resolves the identity cells of one row: solute, solvent with its exact composition, solid form and medium; a fault names
 * the cell that stops it.
 *
 * @param value the row's own value: fractions that count the solute, and a dissolved solvate, need it
 */
export function resolveIdentity(
  cells: (field: string) => string,
  index: SubstanceIndex,
  structure: ReadStructure,
  decimal: DecimalMark = ".",
  value?: RowValue,
): ResolvedIdentity | CellFault {
  const soluteCells = {
    solute: cells("solute"),
    cas: cells("cas"),
    inchikey: cells("inchikey"),
    smiles: cells("smiles"),
    formula: cells("formula"),
    molarMass: cells("molar_mass"),
    decimal,
  };
  const solute = resolveSolute(soluteCells, index, structure);
  if ("code" in solute) return solute;
  const basis = cells("composition_basis");
  const solventCells = {
    solvent: cells("solvent"),
    composition: cells("composition"),
    basis,
    waterWtPercent: cells("solvent_water_wt_percent"),
    grade: cells("solvent_grade"),
    decimal,
    solute: solute.key,
    soluteFraction: (on: CompositionBasis, solventMolarMass: number) =>
      value && soluteFractionOf(value, on, solute.molarMass, solventMolarMass, decimal),
  };
  const stated = resolveSolvent(solventCells, index);
  if ("code" in stated) return stated;
  const form = resolveForm(solute, cells("solid_form"), guestSolvent(stated.solvent), index);
  if ("code" in form) return form;
  const stereo = stereoBeyondName(cells("stereo"), cells("solute"), solute.substance, index);
  if (typeof stereo !== "string") return stereo;
  if (stated.solvent.parts.some(({ substance }) => substance.name === form.solute)) {
    return { field: "solvent", code: "solvent-is-solute", found: `${form.solute} is both solute and solvent` };
  }
  const resolved = solventWithGuest(stated, form, value, decimal, index);
  if ("code" in resolved) return resolved;
  const { solvent, key } = resolved;
  const identity: Identity = {
    solute: form.solute,
    solidForm: form.name,
    ...key,
    medium: mediumOf(cells("medium"), stereo),
    soluteMolarMass: form.unsolvatedMolarMass,
    aqueousSalt: key.solvent === "water" && (form.substance?.electrolyte ?? false),
  };
  return {
    ...{ solute, form, solvent, identity },
    assumptions: joined(form.assumptions, resolved.assumptions),
    ofValue: countsSolute(basis) || changesLiquor(form, stated.solvent),
  };
}
