import type { Problem } from "../problems/catalogue.ts";
import type { Curve, Flag, IdealComparison, PooledScales, SystemFit } from "./fits.ts";
import type { SourceCard } from "./generated/source-card.ts";
import { type MeasurementTable, RowState, textOf } from "./measurements.ts";
import type { Mixtures } from "./mixtures.ts";
import type { Rulings } from "./rulings.ts";
import type { Settings } from "./settings.ts";
import type { System } from "./systems.ts";

/** A source with its account: readings = accepted + refused. */
export interface SourceAccount {
  readonly name: string;
  /** Absent where the card itself could not be read. */
  readonly card?: SourceCard;
  readonly file: string;
  /** SHA-256 of the table; "" where it was not read to its end. */
  readonly sha256: string;
  readonly readings: number;
  readonly accepted: number;
  /** A source refused as a whole counts as one reading refused: how many it held cannot be told. */
  readonly refused: number;
  /** Cells that hold one of the card's missing marks: no readings. */
  readonly missing: number;
  readonly columnsNotUsed: readonly string[];
  /** True if the source was refused as a whole. */
  readonly refusedWhole: boolean;
}

/** A substance that the edition's measurements refer to. */
export interface UsedSubstance {
  /** Key used in every other table. */
  readonly key: string;
  /** Name in the substance tables; "" where it is in none of them. */
  readonly name: string;
  readonly role: "solute" | "solvent" | "solute;solvent";
  readonly cas: string;
  readonly inchikey: string;
  readonly smiles: string;
  readonly formula: string;
  /** Molar mass, g/mol; NaN where unknown. */
  readonly molarMass: number;
  /** Melting point of the stable unsolvated form, K; NaN where unknown. */
  readonly meltingPointK: number;
  readonly hazards: string;
  readonly reference: string;
}

/** What the fits say of each row of the measurement table; NaN where nothing can be said. */
export interface RowResults {
  /** Mole fraction (mass ratio where no molar mass is known) expected with the point left out. */
  readonly predicted: Float64Array;
  /** 100 (value / predicted - 1). */
  readonly deviationPercent: Float64Array;
  /** Deleted, studentised deviation from the screening fit. */
  readonly z: Float64Array;
  /** Weight in the published curve relative to a full one, 0 to 1. */
  readonly weight: Float64Array;
  /** Branch of the curve, 1 and up; 0 where none. */
  readonly branch: Uint8Array;
}

/** The proposed grade of a system with its reasons. */
export interface Grade {
  readonly grade: "recommended" | "tentative" | "doubtful" | "rejected";
  readonly reasons: readonly string[];
}

/** Everything that is known after a collection was curated; what the writers write. */
export interface Edition {
  readonly programVersion: string;
  readonly collection: { readonly name: string; readonly title: string; readonly steward: string };
  readonly settings: Settings;
  /** Sorted by name, those refused as a whole included; a row's `source` is the position here. */
  readonly sources: readonly SourceAccount[];
  readonly substances: readonly UsedSubstance[];
  readonly table: MeasurementTable;
  readonly systems: readonly System[];
  /** By position of the system. */
  readonly fits: readonly SystemFit[];
  readonly scales: PooledScales;
  /** Models over the composition of binary solvents, after the rulings. */
  readonly mixtures: Mixtures;
  readonly flags: readonly Flag[];
  /** What people have decided; flags do not depend on it. */
  readonly rulings: Rulings;
  readonly refused: readonly Problem[];
  readonly notices: readonly Problem[];
  readonly grades: readonly Grade[];
  readonly rowResults: RowResults;
  /** The first curve of each system held against the ideal solubility, or why it is not. By position of the system. */
  readonly ideals: readonly (IdealComparison | { readonly whyNot: string })[];
  /** What contributes how much to a row's uncertainty, percent; `slopePerK` is d ln value/dT of its curve. */
  readonly budgetOf: (
    row: number,
    slopePerK?: number,
  ) => readonly { readonly name: string; readonly percent: number }[];
  /** Properties of a system's liquor that the tables of curves and planning need. */
  readonly liquors: readonly Liquor[];
}

/** What turns a mass ratio into other quantities for one system. */
export interface Liquor {
  /** Mass concentration, g/L solution, of the liquor with mass ratio r at a temperature; NaN where no density is known. */
  readonly massConcentration: (massRatio: number, temperatureK: number) => number;
  /** Density of the solvent at 20 °C, kg/m3; NaN where unknown. */
  readonly solventDensity20C: number;
  /** Where boiling can begin, K: the lowest boiler of a mixture, or its listed azeotrope. NaN where unknown. */
  readonly solventBoilingPointK: number;
  /** Where nothing of the solvent is liquid any more at normal pressure, K: the highest boiler. NaN where unknown. */
  readonly solventHighestBoilingPointK: number;
  readonly solventFreezingPointK: number;
  /** Melting point of the solid form, K; NaN where unknown. */
  readonly formMeltingPointK: number;
  /** Enthalpy of fusion of the form, J/mol; NaN where unknown. */
  readonly formFusionEnthalpy: number;
  /** The solute dissociates. */
  readonly electrolyte: boolean;
  /** The solid holds solvent. */
  readonly solvated: boolean;
  /** The melting data are those of the form dissolved: named, or the only unsolvated one known. */
  readonly meltingOfSameForm: boolean;
  /** The solid that crystallises at a temperature, with M(crystal)/M(unsolvated); undefined where it cannot be told. */
  readonly crystalAt: (temperatureK: number) => { readonly form: string; readonly massFactor: number } | undefined;
  /** Transition temperatures known for the solid in this solvent, K. */
  readonly transitionsK: readonly number[];
  /** Hazard words of solute and solvent, for cautions. */
  readonly hazards: readonly string[];
}

/** What ids are made of. */
export interface Named {
  readonly sources: readonly Pick<SourceAccount, "name" | "card">[];
  readonly table: MeasurementTable;
  readonly systems: readonly System[];
}

/** `SOURCE:LINE` of a row; `SOURCE:LINE:COLUMN` where its source has several solubility columns. */
export function measurementId(edition: Omit<Named, "systems">, row: number): string {
  const source = edition.sources[edition.table.source[row] as number] as Named["sources"][number];
  const id = `${source.name}:${edition.table.line[row]}`;
  return (source.card?.shape ?? "long") === "long"
    ? id
    : `${id}:${textOf(edition.table, edition.table.column[row] as number)}`;
}

/** `CODE@TARGET`: the target is a measurement id, `SOURCE@SYSTEM`, a system id or a source name. */
export function flagId(edition: Named, flag: Flag): string {
  const source = flag.source === undefined ? "" : edition.sources[flag.source]?.name;
  const system = flag.system === undefined ? "" : edition.systems[flag.system]?.id;
  switch (flag.scope) {
    case "measurement":
      return `${flag.code}@${measurementId(edition, flag.row as number)}`;
    case "block":
      return `${flag.code}@${source}@${system}`;
    case "source":
      return `${flag.code}@${source}`;
    case "system":
      return `${flag.code}@${system}`;
  }
}

/** Status of a row as the tables write it. */
export function statusOf(edition: Edition, row: number): "kept" | "set aside" | "interval" | "not fitted" {
  if (edition.rulings.setAside.has(row)) return "set aside";
  const state = edition.table.state[row];
  return state === RowState.interval ? "interval" : state === RowState.notFitted ? "not fitted" : "kept";
}

/** True for a flag that keeps an edition from being published: blocking, and nobody has ruled on it. By its position. */
export function needsRuling(edition: Pick<Edition, "flags" | "rulings">, flag: number): boolean {
  return edition.flags[flag]?.severity === "blocking" && !edition.rulings.ofFlag.has(flag);
}

/** All curves of the edition, by system, then branch. */
export function curvesOf(edition: Edition): Curve[] {
  return edition.fits.flatMap((fit) => fit.curves);
}
