// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of flags.csv: a remark on a measurement, block, source or system. A cell that may be empty is a property that may be absent.
 */
export interface FlagRow {
  /**
   * CODE@TARGET; the target of a block is SOURCE@SYSTEM. No unit.
   */
  flag_id: string;
  /**
   * What the flag is on. Words, no unit.
   */
  scope: "measurement" | "block" | "source" | "system";
  /**
   * Measurement, for scope measurement; key of measurements.csv. No unit.
   */
  measurement_id?: string;
  /**
   * Source, for scope measurement, block and source; key of sources.csv. No unit.
   */
  source?: string;
  /**
   * Line of the measurement in its file, the first line being 1.
   */
  line?: number;
  /**
   * System, for scope measurement, block and system; key of systems.csv. No unit.
   */
  system?: string;
  /**
   * Kind of flag. No unit.
   */
  code: string;
  /**
   * Whether an edition can be published without a ruling on it. Words, no unit.
   */
  severity: "blocking" | "notice";
  /**
   * Likeliest cause; empty where none was sought. Words, no unit.
   */
  suspected_cause?:
    | "power of ten"
    | "dilution factor"
    | "basis mix-up"
    | "temperature unit"
    | "temperature offset"
    | "hydrate basis"
    | "salt or free base"
    | "composition mix-up"
    | "rows shifted"
    | "digits transposed"
    | "value of another solvent"
    | "logarithm base"
    | "calculated value copied"
    | "everything dissolved"
    | "loss on filtration"
    | "solvent lost"
    | "not at equilibrium"
    | "cloud point for clear point"
    | "another solid form"
    | "wet solvent"
    | "no simple cause";
  /**
   * What exactly the cause would be here. Text, no unit.
   */
  cause_detail?: string;
  /**
   * Posterior probability of the cause among those tried, 0 to 1.
   */
  cause_probability?: number;
  /**
   * Value that would fit, in the measurement's reported_unit.
   */
  proposed_value?: number;
  /**
   * What was seen, in words with figures. No unit.
   */
  evidence: string;
  /**
   * What a person should look at. Text, no unit.
   */
  look_at: string;
  /**
   * Ruling that settles it: its name in rulings.csv, and its action. No unit.
   */
  ruling?: string;
}

/** Columns of the table, in their order. */
export const FLAGS_COLUMNS = [
  "flag_id",
  "scope",
  "measurement_id",
  "source",
  "line",
  "system",
  "code",
  "severity",
  "suspected_cause",
  "cause_detail",
  "cause_probability",
  "proposed_value",
  "evidence",
  "look_at",
  "ruling"
] as const satisfies readonly (keyof FlagRow)[];
