import type { Problem, ProblemCode } from "../problems/catalogue.ts";
import { problem } from "../problems/catalogue.ts";
import type { FieldPlaces, Reading, SourceTable } from "./readings.ts";

/** Reads one field of any reading of a source; "" where it was not reported. */
export type CellGetter = (reading: Reading) => string;

/**
 * A getter for one field, decided once per source: this runs for every field of every reading. A place of the reading's
 * own (the temperature of a wide column, say) goes before the source's.
 */
export function cellGetter(places: FieldPlaces, field: string): CellGetter {
  const place = places[field];
  const shared: CellGetter =
    place === undefined
      ? () => ""
      : place.kind === "constant"
        ? () => place.text
        : (reading) => reading.cells[place.index] ?? "";
  return (reading) => {
    const own = reading.own?.[field];
    if (own === undefined) return shared(reading);
    return own.kind === "constant" ? own.text : (reading.cells[own.index] ?? "");
  };
}

/** A getter for the unit of one field: from the card, or from the unit column; "" where none was stated. */
export function unitGetter(places: FieldPlaces, field: string): CellGetter {
  return (reading) => {
    const place = reading.own?.[field] ?? places[field];
    if (place?.kind === "column" && place.unitIndex !== undefined) return reading.cells[place.unitIndex] ?? "";
    return place?.unit ?? "";
  };
}

/** Why one cell stops its reading; the place is added by {@link readingProblem}. */
export interface CellFault {
  readonly field: string;
  readonly code: ProblemCode;
  readonly found: string;
  readonly expected?: string;
  readonly mend?: string;
}

/** A row of a source as text, for refused readings: cells joined by the mark `|` where a comma would mislead. */
function rawRow(reading: Reading): string {
  return reading.cells.join(" | ");
}

/** The problem that refuses a reading, with file, line and column. */
export function readingProblem(source: SourceTable, reading: Reading, fault: CellFault): Problem {
  const place = reading.own?.[fault.field] ?? source.places[fault.field];
  const heading = place?.kind === "column" ? place.heading : fault.field;
  return problem(
    fault.code,
    { source: source.name, file: source.file, line: reading.line, column: heading },
    {
      found: fault.found,
      raw: rawRow(reading),
      ...(fault.expected === undefined ? {} : { expected: fault.expected }),
      ...(fault.mend === undefined ? {} : { mend: fault.mend }),
    },
  );
}
