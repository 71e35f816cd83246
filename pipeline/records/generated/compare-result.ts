// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * What `saltern compare --json` prints: what changed between two editions.
 */
export interface CompareResult {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * The earlier edition.
   */
  old: ComparedEdition;
  /**
   * The later edition.
   */
  new: ComparedEdition;
  /**
   * True where anything below is listed (exit code 1). No unit.
   */
  different: boolean;
  /**
   * Systems that the earlier edition does not have.
   */
  systems_added: ComparedSystem[];
  /**
   * Systems that the later edition does not have.
   */
  systems_gone: ComparedSystem[];
  /**
   * Systems of both editions with another grade.
   */
  grades_changed: GradeChange[];
  /**
   * Systems of both editions that had no curve and have one now.
   */
  curves_added: ComparedSystem[];
  /**
   * Systems of both editions that had a curve and have none now.
   */
  curves_gone: ComparedSystem[];
  /**
   * Curves that moved by more than the 95 % limits of both editions somewhere in their common range.
   */
  curves_moved: CurveMove[];
  /**
   * Curves of both editions without a common temperature in grid.csv; keys of curves.csv. No unit.
   */
  curves_not_compared: string[];
  /**
   * Measurements that the earlier edition does not have.
   */
  measurements_added: ComparedMeasurement[];
  /**
   * Measurements that the later edition does not have.
   */
  measurements_gone: ComparedMeasurement[];
  /**
   * Measurements set aside since.
   */
  measurements_set_aside: ComparedMeasurement[];
  /**
   * Measurements that were set aside and are not any more.
   */
  measurements_taken_back: ComparedMeasurement[];
  /**
   * Measurements whose value is corrected by a ruling since, or by another one.
   */
  measurements_corrected: ComparedMeasurement[];
  /**
   * Measurements whose source reports something else under the same id.
   */
  measurements_reported_otherwise: ComparedMeasurement[];
  /**
   * Measurements that stand on another line of their source. A count.
   */
  measurements_moved: number;
  /**
   * Settings with another value, each as NAME: OLD, now NEW. No unit.
   */
  settings_changed: string[];
  /**
   * Files that both editions have with another content, or that one of them has. No unit.
   */
  files_different: string[];
}
/**
 * An edition.
 */
export interface ComparedEdition {
  /**
   * Name. No unit.
   */
  edition: string;
  /**
   * Date. No unit.
   */
  date: string;
  /**
   * Version of the program that wrote it. No unit.
   */
  program_version: string;
}
/**
 * A system.
 */
export interface ComparedSystem {
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Solute, solid form, solvent, composition and medium in words. No unit.
   */
  name: string;
}
/**
 * A grade that changed.
 */
export interface GradeChange {
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Solute, solid form, solvent, composition and medium in words. No unit.
   */
  name: string;
  /**
   * Grade in the earlier edition. Words, no unit.
   */
  old_grade: "recommended" | "tentative" | "doubtful" | "rejected";
  /**
   * Grade in the later edition. Words, no unit.
   */
  new_grade: "recommended" | "tentative" | "doubtful" | "rejected";
  /**
   * Criteria of the later grade with their numbers. Text, no unit.
   */
  reasons: string;
}
/**
 * A curve that moved.
 */
export interface CurveMove {
  /**
   * Curve; key of curves.csv. No unit.
   */
  curve_id: string;
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Solute, solid form, solvent, composition and medium in words. No unit.
   */
  name: string;
  /**
   * Lowest common temperature compared, K.
   */
  compared_from_K: number;
  /**
   * Highest common temperature compared, K.
   */
  compared_to_K: number;
  /**
   * Lowest temperature at which it moved by more than its limits, K.
   */
  beyond_from_K: number;
  /**
   * Highest such temperature, K.
   */
  beyond_to_K: number;
  /**
   * Temperature at which it went furthest beyond its limits, K.
   */
  largest_at_K: number;
  /**
   * Change of the value there, percent of the earlier value.
   */
  change_percent: number;
  /**
   * Larger half-width of the two curves' 95 % limits there, percent.
   */
  limit_percent: number;
  /**
   * Value of the earlier curve there, in the unit of quantity, a fraction or g/100 g.
   */
  old_value: number;
  /**
   * Value of the later curve there, in the unit of quantity, a fraction or g/100 g.
   */
  new_value: number;
  /**
   * What was compared. Words, no unit.
   */
  quantity: "mole fraction" | "g/100 g solvent";
}
/**
 * A measurement.
 */
export interface ComparedMeasurement {
  /**
   * Measurement; key of measurements.csv. No unit.
   */
  measurement_id: string;
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Solute, solid form, solvent, composition and medium in words. No unit.
   */
  name: string;
  /**
   * Temperature, K.
   */
  temperature_K: number;
  /**
   * Value with its unit as reported. No unit beyond it.
   */
  reported: string;
  /**
   * The ruling behind it, in words with name, date and reason; absent where there is none. No unit.
   */
  ruling?: string;
}
