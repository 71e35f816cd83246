// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of rulings.csv: a person's decision. A cell that may be empty is a property that may be absent.
 */
export interface RulingRow {
  /**
   * Name of the ruling, unique in the collection. No unit.
   */
  ruling_id: string;
  /**
   * Flag id, measurement id, block (SOURCE@SYSTEM) or source it is on; recommended@SYSTEM confirms a grade. No unit.
   */
  target: string;
  /**
   * What is decided. Words, no unit.
   */
  action: "keep" | "set aside" | "correct" | "ask";
  /**
   * Value that replaces the reported one, in corrected_unit; for `correct` alone. Empty: the reported value stands.
   */
  corrected_value?: number;
  /**
   * Unit that replaces the reported one; for `correct` alone. Empty: the reported unit stands. No unit of its own.
   */
  corrected_unit?: string;
  /**
   * Why. Text, no unit.
   */
  reason: string;
  /**
   * Notebook page, author's reply, printed erratum or measurement repeated; needed for `correct`. Text, no unit.
   */
  evidence?: string;
  /**
   * Who decided. Text, no unit.
   */
  by: string;
  /**
   * When, YYYY-MM-DD. No unit.
   */
  date: string;
  /**
   * Hash of the reported fields judged: sha256: and the first 16 hexadecimal digits. No unit.
   */
  fingerprint: string;
}

/** Columns of the table, in their order. */
export const RULINGS_COLUMNS = [
  "ruling_id",
  "target",
  "action",
  "corrected_value",
  "corrected_unit",
  "reason",
  "evidence",
  "by",
  "date",
  "fingerprint"
] as const satisfies readonly (keyof RulingRow)[];
