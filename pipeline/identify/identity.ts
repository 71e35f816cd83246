import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import type { DecimalMark } from "../records/number-text.ts";
import type { Identity } from "../records/systems.ts";
import { type ResolvedForm, resolveForm } from "./solid-form.ts";
import { type KnownSolute, resolveSolute, type SmilesMass } from "./solute.ts";
import { resolveSolvent } from "./solvent.ts";

/** Fields that decide which substance, form, solvent and medium a reading is about. */
export const IDENTITY_FIELDS = [
  ...["solute", "cas", "inchikey", "smiles", "formula", "molar_mass", "solid_form", "stereo"],
  ...["solvent", "composition", "solvent_water_wt_percent", "medium"],
];

/** Everything found out about what was dissolved in what. */
export interface ResolvedIdentity {
  readonly solute: KnownSolute;
  readonly form: ResolvedForm;
  readonly solvent: Substance;
  readonly identity: Identity;
}

/** Medium with stereochemistry: both keep systems apart. Blanks are folded, case is kept. */
function mediumOf(medium: string, stereo: string): string {
  const fold = (text: string) => text.trim().replace(/\s+/g, " ");
  return [fold(medium), fold(stereo)].filter((part) => part !== "").join("; ");
}

/** Resolves the identity cells of one row: solute, solvent, solid form and medium; a fault names the cell that stops it. */
export function resolveIdentity(
  cells: (field: string) => string,
  index: SubstanceIndex,
  smilesMass: SmilesMass,
  decimal: DecimalMark = ".",
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
  const solute = resolveSolute(soluteCells, index, smilesMass);
  if ("code" in solute) return solute;
  const solvent = resolveSolvent(
    cells("solvent"),
    cells("composition"),
    cells("solvent_water_wt_percent"),
    decimal,
    index,
  );
  if ("code" in solvent) return solvent;
  const form = resolveForm(solute, cells("solid_form"), solvent, index);
  if ("code" in form) return form;
  if (form.solute === solvent.name) {
    return { field: "solvent", code: "solvent-is-solute", found: `${form.solute} is both solute and solvent` };
  }
  const identity: Identity = {
    solute: form.solute,
    solidForm: form.name,
    solvent: solvent.name,
    composition: "",
    solventComponents: [{ name: solvent.name, massFraction: 1 }],
    medium: mediumOf(cells("medium"), cells("stereo")),
    soluteMolarMass: form.unsolvatedMolarMass,
    solventMolarMass: solvent.molarMass ?? Number.NaN,
    aqueousSalt: solvent.name === "water" && (form.substance?.electrolyte ?? false),
  };
  return { solute, form, solvent, identity };
}
