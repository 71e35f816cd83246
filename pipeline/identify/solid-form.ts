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
const ANHYDROUS = /^(?:anhydrous|anhydrate|unsolvated|ansolvate)$/i;
const SOLVATED = /hydrate|solvate/i;
const COUNTS: readonly (readonly [prefix: string, count: number])[] = [
  ...([
    ["hemi", 0.5],
    ["mono", 1],
    ["sesqui", 1.5],
    ["di", 2],
    ["tri", 3],
    ["tetra", 4],
    ["penta", 5],
  ] as const),
  ...([
    ["hexa", 6],
    ["hepta", 7],
    ["octa", 8],
    ["nona", 9],
    ["deca", 10],
    ["dodeca", 12],
    ["octadeca", 18],
  ] as const),
];
const WATER_MOLAR_MASS = 18.015;

/** Water molecules per solute that a form's name states (`pentahydrate`); undefined where it states none. */
function waterCount(name: string): number | undefined {
  const prefix = /^(\w+)hydrate$/i.exec(name.trim())?.[1]?.toLowerCase();
  return COUNTS.find(([known]) => known === prefix)?.[1];
}

/** R of a form: from its molar mass in the tables, else from the water count in its name, else unknown. */
function massFactor(name: string, form: SolidForm | undefined, unsolvatedMolarMass: number): number {
  if (form?.molarMass !== undefined) return form.molarMass / unsolvatedMolarMass;
  const count = waterCount(name);
  return count === undefined ? Number.NaN : 1 + (count * WATER_MOLAR_MASS) / unsolvatedMolarMass;
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
  const text = cell.trim().replace(/\s+/g, " ");
  const stated = UNSPECIFIED.has(text.toLowerCase()) ? "" : text;
  const listed = stated === "" || substance === undefined ? undefined : index.formOf(substance, stated);
  if (stated !== "" && namedForm !== undefined && listed?.form !== namedForm.form) {
    const found = `the solute's name stands for the ${namedForm.form}, the solid form says ${stated}`;
    return { field: "solid_form", code: "contradictory-identity", found };
  }
  const form = listed ?? (stated === "" ? namedForm : undefined);
  const name = form?.form ?? (stated === "" ? "unspecified" : stated);
  const solvated = form
    ? form.kind === "hydrate" || form.kind === "solvate"
    : SOLVATED.test(name) && !ANHYDROUS.test(name);
  const hydrates = substance?.solidForms.filter(
    ({ kind, guest }) => kind === "hydrate" && (guest ?? "water") === solvent.name,
  );
  const assumptions =
    name === "unspecified" && hydrates !== undefined && hydrates.length > 0
      ? [`solid form not stated: value taken as unsolvated ${key}`]
      : [];
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
