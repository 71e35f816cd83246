import type { Liquor } from "../records/edition.ts";
import type { Curve, PooledScales, RobustFit } from "../records/fits.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { MixtureModel } from "../records/mixtures.ts";
import type { InReportedUnit, Reread } from "../records/reread.ts";
import type { Settings } from "../records/settings.ts";
import type { System } from "../records/systems.ts";
import { materialThreshold, type ThresholdKind, type ThresholdSettings } from "./material-threshold.ts";

/** What screening must know of a system beyond its fit. */
export interface ScreenedSystem {
  readonly kind: ThresholdKind;
  /** Normal boiling and freezing point of the solvent, K; NaN where unknown. */
  readonly boilingPointK: number;
  readonly freezingPointK: number;
  /** Melting data of the solid and densities of the solution; absent where nothing is known of them. */
  readonly liquor?: Liquor;
}

/** Everything screening looks at. Rulings are not among it: flags depend on sources and settings only. */
export interface ScreenInput {
  readonly table: MeasurementTable;
  readonly systems: readonly System[];
  /** By position of the system. */
  readonly fits: readonly RobustFit[];
  /** Curves by position of the system, before any ruling. */
  readonly curves: readonly (readonly Curve[])[];
  readonly about: readonly ScreenedSystem[];
  /** Models over the composition of binary solvents, before any ruling; absent where there is none. */
  readonly mixtures?: readonly MixtureModel[];
  readonly scales: PooledScales;
  readonly sourceNames: readonly string[];
  readonly reread: Reread;
  readonly inReportedUnit: InReportedUnit;
  readonly settings: ThresholdSettings & Pick<Settings, "false_discovery_rate" | "pharmacopoeia_factor">;
}

/** Material threshold of a point of a system, ln value. */
export function thresholdOf(input: ScreenInput, system: number, point: number): number {
  const { points } = input.fits[system]!;
  const kind = input.about[system]?.kind ?? "general";
  return materialThreshold(points.level[point]!, points.lnU[point]!, kind, input.settings);
}

/** Name of a source by its position. */
export function sourceName(input: ScreenInput, source: number): string {
  return input.sourceNames[source] ?? `source ${source + 1}`;
}
