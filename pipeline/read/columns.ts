import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type { SourceCard } from "../records/generated/source-card.ts";
import type { DecimalMark } from "../records/number-text.ts";
import { FIELDS, type FieldPlace, type SourceTable } from "../records/readings.ts";
import { NUMBER_FIELDS } from "./decimal-mark.ts";
import { didYouMean } from "./near-miss.ts";

/** What a card says of a column, whatever its field. */
interface ColumnSpec {
  readonly column: string;
  readonly unit?: string;
  readonly unit_column?: string;
}

/** What a card says of a constant, whatever its field. */
type ConstantSpec = string | number | { readonly value: string | number; readonly unit?: string };

/** How the card and the headings of one table fit together. */
export interface Layout extends Pick<SourceTable, "carried" | "columnsNotUsed"> {
  readonly columnPlaces: Readonly<Record<string, FieldPlace>>;
  /** Position of the solubility column. */
  readonly valueIndex: number;
  /** Positions of all other columns that a field or a unit is taken from. */
  readonly otherIndexes: readonly number[];
  /** Positions of the columns whose cells are numbers. */
  readonly numberIndexes: readonly number[];
}

function columnSpecs({ columns }: SourceCard): Readonly<Record<string, ColumnSpec | undefined>> {
  return columns as Readonly<Record<string, ColumnSpec | undefined>>;
}

/** Every heading that a card names, in the order of the fields, then the carried ones. */
export function namedHeadings(card: SourceCard): string[] {
  const specs = Object.values(columnSpecs(card));
  const named = specs.flatMap((spec) => (spec === undefined ? [] : [spec.column, spec.unit_column ?? spec.column]));
  return [...new Set([...named, ...(card.carry ?? [])])];
}

/**
 * Finds every column that a card names among the headings of its table.
 * @throws InputError `missing-column` (all missing ones told, with near misses) or `duplicate-column`
 */
export function layOut(card: SourceCard, headings: readonly string[], place: Place): Layout {
  const named = namedHeadings(card);
  checkHeadings(named, headings, place);
  const indexOf = (heading: string) => headings.indexOf(heading);
  const specs = columnSpecs(card);
  const columnPlaces: Record<string, FieldPlace> = {};
  for (const field of FIELDS) {
    const spec = specs[field];
    if (spec === undefined) continue;
    columnPlaces[field] = {
      ...{ kind: "column", heading: spec.column, index: indexOf(spec.column) },
      ...(spec.unit === undefined ? {} : { unit: spec.unit }),
      ...(spec.unit_column === undefined ? {} : { unitIndex: indexOf(spec.unit_column) }),
    };
  }
  const valueIndex = indexOf(specs.solubility?.column ?? "");
  const taken = Object.values(specs).flatMap((spec) => [spec?.column, spec?.unit_column]);
  const indexes = new Set(taken.flatMap((heading) => (heading === undefined ? [] : [indexOf(heading)])));
  const numbers = FIELDS.filter((field) => NUMBER_FIELDS.has(field) && specs[field] !== undefined);
  return {
    ...{ columnPlaces, valueIndex },
    otherIndexes: [...indexes].filter((index) => index !== valueIndex),
    numberIndexes: [...new Set(numbers.map((field) => indexOf(specs[field]?.column ?? "")))],
    carried: (card.carry ?? []).map((heading) => ({ heading, index: indexOf(heading) })),
    columnsNotUsed: notUsed(headings, named),
  };
}

/** Headings that no field takes and no one carries; a column without a heading is told by its position. */
function notUsed(headings: readonly string[], named: readonly string[]): string[] {
  const shown = headings.map((heading, i) => (heading === "" ? `(column ${i + 1}, without a heading)` : heading));
  return shown.filter((heading) => !named.includes(heading));
}

function checkHeadings(named: readonly string[], headings: readonly string[], place: Place): void {
  const missing = named.filter((heading) => !headings.includes(heading));
  const [first] = missing;
  if (first !== undefined) {
    const told = missing.map((heading) => `"${heading}"${didYouMean(heading, headings)}`).join(", ");
    const found = `the table has no column ${told}`;
    const expected = `the headings the card names; the table has ${headings.map((heading) => `"${heading}"`).join(", ")}`;
    throw new InputError(problem("missing-column", { ...place, column: first }, { found, expected }));
  }
  const twice = named.find((heading) => headings.indexOf(heading) !== headings.lastIndexOf(heading));
  if (twice !== undefined) {
    const positions = headings.flatMap((heading, i) => (heading === twice ? [i + 1] : []));
    const found = `"${twice}" heads columns ${positions.join(" and ")}`;
    throw new InputError(problem("duplicate-column", { ...place, column: twice }, { found }));
  }
}

/** Places of the card's constants. Numbers of JSON are written with the decimal mark that the source is read with. */
export function constantPlaces(card: SourceCard, decimal: DecimalMark): Record<string, FieldPlace> {
  const constants = (card.constants ?? {}) as Readonly<Record<string, ConstantSpec | undefined>>;
  const text = (value: string | number) => (typeof value === "number" ? String(value).replace(".", decimal) : value);
  const places: Record<string, FieldPlace> = {};
  for (const field of FIELDS) {
    const spec = constants[field];
    if (spec === undefined) continue;
    places[field] =
      typeof spec === "object"
        ? { kind: "constant", text: text(spec.value), ...(spec.unit === undefined ? {} : { unit: spec.unit }) }
        : { kind: "constant", text: text(spec) };
  }
  return places;
}
