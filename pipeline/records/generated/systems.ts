// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of systems.csv: one solute in one solid form, one solvent composition and one medium. A cell that may be empty is a property that may be absent.
 */
export interface SystemRow {
  /**
   * System: readable name and 8 hexadecimal digits of its key. No unit.
   */
  system: string;
  /**
   * Family: the systems of this solute, solvent and medium in any solid form. No unit.
   */
  family: string;
  /**
   * Solute; key of substances.csv. No unit.
   */
  solute: string;
  /**
   * Solid form, or `unspecified`. No unit.
   */
  solid_form: string;
  /**
   * Solvent; components of a mixture joined by ` + `, each a key of substances.csv. No unit.
   */
  solvent: string;
  /**
   * Composition key of a mixed solvent, mass fractions; empty for a pure one.
   */
  composition?: string;
  /**
   * What else is dissolved; empty for nothing. No unit.
   */
  medium?: string;
  /**
   * Measurements in all: kept + set aside + intervals + not fitted. A count.
   */
  n_measurements: number;
  /**
   * Measurements with status kept. A count.
   */
  n_kept: number;
  /**
   * Measurements set aside by a ruling. A count.
   */
  n_set_aside: number;
  /**
   * Measurements known only as a range. A count.
   */
  n_interval: number;
  /**
   * Measurements that no curve uses (cloud points, kinetic values). A count.
   */
  n_not_fitted: number;
  /**
   * Sources the measurements come from. A count.
   */
  n_sources: number;
  /**
   * Laboratories they come from. A count.
   */
  n_laboratories: number;
  /**
   * Lowest temperature measured, K.
   */
  T_min_K: number;
  /**
   * Highest temperature measured, K.
   */
  T_max_K: number;
  /**
   * Whether the sources agree. Words, no unit.
   */
  agreement: "agreed" | "conflict" | "cannot tell";
  /**
   * Curves of the system, `;` between them; keys of curves.csv. No unit.
   */
  curve_ids?: string;
  /**
   * Why there is no curve. Text, no unit.
   */
  no_curve_reason?: string;
  /**
   * Flags on the system, its blocks and its measurements. A count.
   */
  n_flags: number;
  /**
   * Of these, the blocking ones without a ruling. A count.
   */
  n_blocking_flags: number;
  /**
   * Grade proposed. Words, no unit.
   */
  grade: "recommended" | "tentative" | "doubtful" | "rejected";
  /**
   * Criteria of the grade, each with its number, `; ` between them. No unit.
   */
  reasons: string;
}

/** Columns of the table, in their order. */
export const SYSTEMS_COLUMNS = [
  "system",
  "family",
  "solute",
  "solid_form",
  "solvent",
  "composition",
  "medium",
  "n_measurements",
  "n_kept",
  "n_set_aside",
  "n_interval",
  "n_not_fitted",
  "n_sources",
  "n_laboratories",
  "T_min_K",
  "T_max_K",
  "agreement",
  "curve_ids",
  "no_curve_reason",
  "n_flags",
  "n_blocking_flags",
  "grade",
  "reasons"
] as const satisfies readonly (keyof SystemRow)[];
