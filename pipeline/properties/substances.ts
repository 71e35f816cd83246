import type { LiquidDensityModel } from "./liquid-density.ts";
import type { SaltKind } from "./salt-kind.ts";
import type { ApparentDensityCoefficients } from "./solution-density-model.ts";
import type { TableFault } from "./table-cells.ts";

export type SubstanceRole = "solute" | "solvent";

export type SolidFormKind = "polymorph" | "hydrate" | "solvate" | "salt" | "co-crystal" | "amorphous";

/** A substance as the tables describe it; undefined where a value is unknown. */
export interface Substance {
  readonly name: string;
  readonly roles: readonly SubstanceRole[];
  readonly synonyms: readonly string[];
  /** CAS Registry Number whose check digit is right. */
  readonly cas: string | undefined;
  readonly inchikey: string | undefined;
  readonly smiles: string | undefined;
  /** Formula as written in the table. */
  readonly formula: string | undefined;
  /** Molar mass [g/mol]: from the formula where there is one, else as stated. */
  readonly molarMass: number | undefined;
  /** Standard uncertainty of the molar mass [g/mol]. */
  readonly molarMassUncertainty: number | undefined;
  /** Melting point of the stable unsolvated form [K]. */
  readonly meltingPointK: number | undefined;
  readonly boilingPointK: number | undefined;
  /** Enthalpy of fusion of the stable unsolvated form [J/mol]. */
  readonly fusionEnthalpy: number | undefined;
  /** Density of the solid [kg/m3]. */
  readonly solidDensity: number | undefined;
  /** Densities of the liquid, in order of preference (see `liquidDensity`). */
  readonly liquidDensities: readonly LiquidDensityModel[];
  /** Apparent-density coefficients in water (see `solutionDensityModel`). */
  readonly apparentDensity: ApparentDensityCoefficients | undefined;
  /** Hazard classes in words, for screening only. */
  readonly hazards: readonly string[];
  /** Dissolves as ions in water. */
  readonly electrolyte: boolean;
  readonly salt: SaltKind | undefined;
  /** Every other property of the property tables, by property name. */
  readonly properties: ReadonlyMap<string, Property>;
  readonly solidForms: readonly SolidForm[];
  /** Set for a hydrate, solvate or polymorph listed under a name of its own: the substance and form it is. */
  readonly formOf: FormName | undefined;
  readonly references: readonly string[];
}

/** One row of a property table. */
export interface Property {
  /** As written: a number, or a word such as a class. */
  readonly text: string;
  readonly value: number | undefined;
  readonly unit: string;
  readonly standardUncertainty: number | undefined;
  readonly lowestK: number | undefined;
  readonly highestK: number | undefined;
  readonly reference: string;
}

export interface FormName {
  readonly substance: string;
  readonly form: string;
}

/** A solid form of a substance; molar mass and melting data are those of the form itself, guest included. */
export interface SolidForm {
  readonly solute: string;
  readonly form: string;
  readonly kind: SolidFormKind;
  /** Name of the solvent of crystallisation, counter-ion or co-former. */
  readonly guest: string | undefined;
  readonly guestPerSolute: number | undefined;
  /** Molar mass of one solute with its guests [g/mol]. */
  readonly molarMass: number | undefined;
  readonly meltingPointK: number | undefined;
  /** Enthalpy of fusion [J/mol]. */
  readonly fusionEnthalpy: number | undefined;
  /** Density of the solid [kg/m3]. */
  readonly solidDensity: number | undefined;
  /** Temperature [K] at which the form turns into `toForm` on heating (in contact with its solution, if a hydrate). */
  readonly transitionK: number | undefined;
  readonly toForm: string | undefined;
  readonly reference: string;
}

/** What a text stands for: the unsolvated substance, and the form if the text names one. */
export interface ResolvedName {
  readonly substance: Substance;
  readonly form: SolidForm | undefined;
}

/** Substances with their lookups. Lookups never guess: a text that could mean two substances finds none. */
export interface SubstanceIndex {
  readonly substances: readonly Substance[];
  /** Contradictions and gaps found in the tables; the values concerned are left out. */
  readonly faults: readonly TableFault[];
  /** By name, synonym or written salt formula; case, blanks, dashes, primes and Greek letters are folded. */
  readonly byName: (text: string) => Substance | undefined;
  /** All substances a text could mean: more than one where `byName` finds none because of that. */
  readonly namesakes: (text: string) => readonly Substance[];
  readonly byCas: (cas: string) => Substance | undefined;
  readonly byInchikey: (inchikey: string) => Substance | undefined;
  /** By the very same SMILES text. */
  readonly bySmiles: (smiles: string) => Substance | undefined;
  /** Substance and form by a name that may include a form: "blue vitriol", "CuSO4·5H2O", "paracetamol form II". */
  readonly resolve: (text: string) => ResolvedName | undefined;
  /** The unsolvated substance, and the form, of a substance that is itself listed as a form (a hydrate found by its CAS). */
  readonly unsolvated: (substance: Substance) => ResolvedName;
  /** A form of a substance by its name ("pentahydrate", "form II", "II"). */
  readonly formOf: (substance: Substance, form: string) => SolidForm | undefined;
  /** Close spellings for a message: never to be assumed. */
  readonly nearNames: (text: string) => readonly string[];
}
