import { createHash } from "node:crypto";
import { cellGetter, unitGetter } from "../records/cells.ts";
import { FIELDS, type Reading, type SourceTable } from "../records/readings.ts";

/** Fields judged: all that a source reports of a measurement but remarks, which may be added at any time. */
const JUDGED = FIELDS.filter((field) => field !== "note" && field !== "solubility");

/** Hexadecimal digits kept of a SHA-256: 64 bits, so that two of a million lines are alike by chance once in 10^7 such tables. */
const DIGITS = 16;

const sha256 = (text: string) => createHash("sha256").update(text, "utf8").digest("hex");

/** A function that hashes what a reading of the source reports: the text and unit of every field judged, none empty. */
export function readingHasher(source: SourceTable): (reading: Reading) => string {
  const fields = JUDGED.map(
    (field) => [field, cellGetter(source.places, field), unitGetter(source.places, field)] as const,
  );
  const unitOfValue = unitGetter(source.places, "solubility");
  return (reading) => {
    const told = [["solubility", reading.cells[reading.valueIndex] ?? "", unitOfValue(reading)]];
    for (const [field, text, unit] of fields) {
      const cell = text(reading);
      if (cell !== "") told.push([field, cell, unit(reading)]);
    }
    return sha256(JSON.stringify(told));
  };
}

/**
 * Fingerprint of what a ruling judges: for one measurement, SHA-256 of its reported cells; for several, SHA-256 of their
 * hashes in ascending order, so that moving lines changes nothing and adding, dropping or editing one does. The first 16
 * hexadecimal digits are kept, behind `sha256:`, so that a spreadsheet does not take them for a number.
 */
export function fingerprintOf(rowHashes: readonly string[]): string {
  const whole = rowHashes.length === 1 ? (rowHashes[0] as string) : sha256([...rowHashes].sort().join("\n"));
  return `sha256:${whole.slice(0, DIGITS)}`;
}
