import { basename } from "node:path";
import { type Place, type Problem, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type { SourceCard } from "../records/generated/source-card.ts";
import { validateSourceCard } from "../records/validators.js";
import { type JsonFile, type JsonPath, placeOf, readJsonFile } from "./json-file.ts";
import { schemaProblem } from "./schema-faults.ts";

/** End of the name of every source card. */
export const CARD_END = ".source.json";

/** Name of a card's file without its end: the name that stands for a source whose card cannot be read. */
export function cardName(path: string): string {
  const name = basename(path);
  return name.endsWith(CARD_END) ? name.slice(0, -CARD_END.length) : name.replace(/\.json$/, "");
}

/** Fields of which one is needed to know the solute. */
const SOLUTE_FIELDS = ["solute", "cas", "inchikey", "smiles", "formula"] as const;

/**
 * Reads a source card and checks what it says in itself.
 * @throws InputError `not-json`, `wrong-card` or `bad-source-name`, each with line and key
 */
export function readCard(path: string, shown: string): SourceCard {
  const place: Place = { source: cardName(path), file: shown };
  const file = readJsonFile(path, place);
  const card = file.value;
  if (!validateSourceCard(card)) throw new InputError(cardProblem(file, place));
  checkFields(card, file, place);
  return card;
}

function cardProblem(file: JsonFile, place: Place): Problem {
  const errors = validateSourceCard.errors ?? [];
  const found = schemaProblem("wrong-card", file, "source-card.schema.json", errors, place);
  const [only] = errors;
  if (errors.length > 1 || only?.instancePath !== "/source" || only.keyword !== "pattern") return found;
  return problem("bad-source-name", found.place, { found: found.found });
}

/** Checks what the schema cannot say: every field from one place, the four needed ones there, solubility in a column. */
function checkFields(card: SourceCard, file: JsonFile, place: Place): void {
  const columns: Readonly<Record<string, unknown>> = { ...card.columns };
  const constants: Readonly<Record<string, unknown>> = { ...card.constants };
  const wrong = (path: JsonPath, found: string, expected: string) => {
    const { line } = placeOf(file, path, true);
    return new InputError(problem("wrong-card", { ...place, line, column: String(path.at(-1)) }, { found, expected }));
  };
  for (const field of Object.keys(constants)) {
    if (field in columns) {
      throw wrong(["constants", field], `"${field}" is both a column and a constant`, "each field from one place only");
    }
  }
  const said = (field: string) => field in columns || field in constants;
  if (!SOLUTE_FIELDS.some(said)) {
    throw wrong(["columns"], "the card does not say where the solute stands", `one of ${SOLUTE_FIELDS.join(", ")}`);
  }
  for (const field of ["solvent", "temperature"]) {
    if (!said(field)) throw wrong(["columns"], `the card does not say where the ${field} stands`, `a "${field}"`);
  }
  if (!("solubility" in columns)) {
    const path = "solubility" in constants ? ["constants", "solubility"] : ["columns"];
    throw wrong(path, "the card names no solubility column", 'a "solubility" under columns: one cell is one reading');
  }
}
