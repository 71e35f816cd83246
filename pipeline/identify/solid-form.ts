import { formName, otherNumeral, waterCount } from "../properties/form-name.ts";
import type { SolidForm, Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import type { KnownSolute } from "./solute.ts";

/** The solid a row is about. */
export interface ResolvedForm {
  /** Key of the unsolvated solute. */
  readonly solute: string;
  readonly substance: Substance | undefined;
  /** Name of the form, or `unspecified`. */
  readonly name: string;
  readonly form: SolidForm | undefined;
  /** Molar mass of the unsolvated solute, g/mol; NaN where unknown. */
  readonly unsolvatedMolarMass: number;
  /** M(crystal)/M(unsolvated): 1 for an unsolvated or unspecified form; NaN where the count of guests is unknown. */
  readonly crystalMassFactor: number;
  readonly solvated: boolean;
  readonly assumptions: readonly string[];
}

/** Spellings of a form that name none. */
const UNSPECIFIED: ReadonlySet<string> = new Set(["", "unspecified", "unknown", "not stated", "n/a"]);
const ANHYDROUS = /anhydrous|unsolvated|nonsolvated|ansolvate|solvent-?free/i;
const SOLVATED = /hydrate|solvate/i;
const WATER_MOLAR_MASS = 18.015;

/** R of a form: from its molar mass in the tables, else from the water count in its name, else unknown. */
function massFactor(name: string, form: SolidForm | undefined, unsolvatedMolarMass: number): number {
  if (form?.molarMass !== undefined) return form.molarMass / unsolvatedMolarMass;
  const count = waterCount(name);
  return count === undefined ? Number.NaN : 1 + (count * WATER_MOLAR_MASS) / unsolvatedMolarMass;
}

/**
 * The listed form that a name stands for. Where only the other kind of numeral is listed (`form I` for `form 1`), it is
 * taken, and said so.
 */
function listedForm(
  substance: Substance | undefined,
  stated: string,
  index: SubstanceIndex,
): { readonly listed: SolidForm | undefined; readonly taken: boolean } {
  if (stated === "" || substance === undefined) return { listed: undefined, taken: false };
  const listed = index.formOf(substance, stated);
  const numeral = listed === undefined ? otherNumeral(stated) : undefined;
  const other = numeral === undefined ? undefined : index.formOf(substance, numeral);
  return { listed: listed ?? other, taken: other !== undefined };
}

/**
 * Resolves the solid form of a row: the form its cell names, else the one the solute's own name stands for, else
 * unspecified. A solute written as a hydrate becomes its unsolvated solute and that form; two different forms are a fault.
 */
export function resolveForm(
  solute: KnownSolute,
  cell: string,
  solvent: Substance,
  index: SubstanceIndex,
): ResolvedForm | CellFault {
  const { substance, namedForm, molarMass, key } = solute;
  const text = cell.trim();
  const stated = UNSPECIFIED.has(text.toLowerCase()) ? "" : formName(text);
  const { listed, taken } = listedForm(substance, stated, index);
  const said = listed?.form ?? stated;
  if (stated !== "" && namedForm !== undefined && said !== namedForm.form && stated !== formName(namedForm.form)) {
    const found = `the solute's name stands for the ${namedForm.form}, the solid form says ${text}`;
    return { field: "solid_form", code: "contradictory-identity", found };
  }
  const form = listed ?? namedForm;
  const name = form?.form ?? (stated === "" ? "unspecified" : stated);
  const solvated = form
    ? form.kind === "hydrate" || form.kind === "solvate"
    : SOLVATED.test(name) && !ANHYDROUS.test(name);
  const hydrates = substance?.solidForms.filter(
    ({ kind, guest }) => kind === "hydrate" && (guest ?? "water") === solvent.name,
  );
  const open = name === "unspecified" && hydrates !== undefined && hydrates.length > 0;
  const assumptions = [
    ...(open ? [`solid form not stated: value taken as unsolvated ${key}`] : []),
    ...(taken ? [`solid form "${text}" taken as the listed ${name}`] : []),
  ];
  return {
    solute: key,
    substance,
    name,
    form,
    unsolvatedMolarMass: molarMass,
    crystalMassFactor: solvated ? massFactor(name, form, molarMass) : 1,
    solvated,
    assumptions,
  };
}
